import 'reflect-metadata';
import { writeFile } from 'node:fs/promises';
import { readDatabase } from '../config.ts';
import { createDataSource } from '../db/data-source.ts';
import { Organisation } from '../features/organisations/organisation.entity.ts';
import { getBundle } from '../features/publications/bundle.service.ts';
import { Publication } from '../features/publications/publication.entity.ts';

// npm run demo:bundle -- FILE: writes the bundle of the study that the demo has published.

async function main(file: string | undefined): Promise<string> {
  if (file === undefined || file.startsWith('--')) throw new Error('say where to: npm run demo:bundle -- demo.zip');
  const db = createDataSource(readDatabase(process.env));
  await db.initialize();
  try {
    const demo = await db.manager.findOneBy(Organisation, { demo: true });
    if (demo === null) throw new Error('there is no demo in this database; npm start makes it');
    const [publication] = await db.manager.find(Publication, {
      where: { organisationId: demo.id },
      order: { publishedAt: 'ASC' },
      take: 1,
    });
    if (publication === undefined) throw new Error('the demo has published nothing');
    const bundle = await getBundle({ db }, publication.id);
    await writeFile(file, bundle);
    return `${publication.title}, published at /p/${publication.id}: ${bundle.length} bytes in ${file}. Check it: npm run verify -- ${file}`;
  } finally {
    await db.destroy();
  }
}

main(process.argv[2]).then(
  (words) => process.stdout.write(`${words}\n`),
  (error: unknown) => {
    process.stderr.write(`No bundle was written: ${error instanceof Error ? error.message : String(error)}\n`);
    process.exitCode = 1;
  },
);
