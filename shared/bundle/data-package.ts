import { canonicalJson, type Json } from '../ledger/canonical-json.ts';
import { fileDigest, utf8ToBytes } from '../ledger/digest.ts';
import type { StudyReading } from '../ledger/study-reading.ts';
import { type Table, tableText } from './tables.ts';

/**
 * The description of the tables that data tools read (datapackage.json), with a schema for each.
 *
 * @see Data Package, Tabular Data Package and Table Schema, version 1 (specs.frictionlessdata.io)
 */
export function dataPackageText(study: StudyReading, tables: readonly Table[]): string {
  const { title, question, study: id } = study.protocol();
  const description = {
    profile: 'tabular-data-package',
    name: `fairlead-${id}`,
    title,
    description: question,
    resources: tables.map(resourceOf),
  };
  return canonicalJson(description as unknown as Json);
}

function resourceOf(table: Table) {
  const bytes = utf8ToBytes(tableText(table));
  return {
    profile: 'tabular-data-resource',
    name: table.name,
    path: `${table.name}.csv`,
    title: table.title,
    format: 'csv',
    mediatype: 'text/csv',
    encoding: 'utf-8',
    bytes: bytes.length,
    hash: `sha256:${fileDigest(bytes)}`,
    dialect: { delimiter: ',', lineTerminator: '\r\n', quoteChar: '"', doubleQuote: true, header: true },
    schema: {
      fields: table.fields.map(({ name, type, description }) => ({ name, type, description })),
      primaryKey: [...table.key],
      missingValues: [''],
    },
  };
}
