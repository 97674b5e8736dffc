import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { checkPublished, type PublishedCheck } from './check-published.ts';
import { checkRecords, type Line, type Pending, type ReferenceRecord } from './check-records.ts';
import { mappings } from './functions.ts';
import { publishedValues } from './published-values.ts';

/** Every *.json of a folder that is a list of records of one of the two shapes; other files are named, not read. */
export function checkFolder(folder: string, pending: Pending): { lines: Line[]; files: number; skipped: string[] } {
  const records: ReferenceRecord[] = [];
  const published: PublishedCheck[] = [];
  const skipped: string[] = [];
  let files = 0;
  for (const name of readdirSync(folder)
    .filter((each) => each.endsWith('.json'))
    .sort()) {
    const content: unknown = JSON.parse(readFileSync(join(folder, name), 'utf8'));
    const list = Array.isArray(content) ? content : [];
    files += 1;
    if (list.length > 0 && list.every((each) => 'fn' in each && 'expected' in each)) records.push(...list);
    else if (list.length > 0 && list.every((each) => 'topic' in each && 'published' in each)) published.push(...list);
    else skipped.push(name);
  }
  const lines = [...checkRecords(records, mappings, pending), ...checkPublished(published, publishedValues, pending)];
  return { lines, files, skipped };
}
