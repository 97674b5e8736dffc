import 'reflect-metadata';
import { readDatabase } from '../config.ts';
import { createDataSource } from '../db/data-source.ts';
import { auditAll } from '../features/audits/audits.service.ts';

// npm run audit: every record of the database, of all organisations. Ends with status 0 only when all of them hold.

const say = (line: string) => process.stdout.write(`${line}\n`);

async function main(): Promise<number> {
  const db = createDataSource(readDatabase(process.env));
  await db.initialize();
  const sum = { organisations: 0, studies: 0, entries: 0, signatures: 0, tokens: 0, faults: 0 };
  // What lies in the database itself is told with each organisation, and printed once.
  const told = new Set<string>();
  for await (const { studies, entries, signatures, tokens, faults } of auditAll({ db })) {
    sum.organisations += 1;
    sum.studies += studies;
    sum.entries += entries;
    sum.signatures += signatures;
    sum.tokens += tokens;
    for (const { studyId, title, sequence, why } of faults) {
      const where = sequence === null ? '' : `, entry ${sequence}`;
      const line = studyId === null ? `${title}: ${why}.` : `${title} (${studyId})${where}: ${why}.`;
      if (told.has(line)) continue;
      told.add(line);
      say(`BROKEN  ${line}`);
    }
  }
  await db.destroy();
  say(
    `${sum.organisations} organisations, ${sum.studies} studies: ${sum.entries} entries, ${sum.signatures} signatures, ${sum.tokens} tokens.`,
  );
  say(told.size === 0 ? 'Every record holds.' : `${told.size} do not hold; the first break of each is above.`);
  return told.size === 0 ? 0 : 1;
}

main().then(
  (status) => process.exit(status),
  (error: unknown) => {
    process.stderr.write(
      `The records could not be audited: ${error instanceof Error ? error.message : String(error)}\n`,
    );
    process.exit(2);
  },
);
