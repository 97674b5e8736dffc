import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join, normalize } from 'node:path';
import { describe, expect, it } from 'vitest';

const sources = ['shared', 'server', 'src']
  .flatMap((folder) => readdirSync(folder, { recursive: true, encoding: 'utf8' }).map((name) => join(folder, name)))
  .filter((name) => /\.tsx?$/.test(name) && !name.endsWith('.d.ts'));

function importsOf(file: string): string[] {
  const text = readFileSync(file, 'utf8');
  return [...text.matchAll(/from '([^']+)'|import\('([^']+)'\)/g)]
    .map(([, one, other]) => one ?? other ?? '')
    .filter((name) => name.startsWith('.') || name.startsWith('#shared/'))
    .map((name) => (name.startsWith('#') ? name.slice(1) : normalize(join(dirname(file), name))));
}

/** Imports that are still there once types are gone. */
function loadsOf(file: string): string[] {
  const types = new Set(
    [...readFileSync(file, 'utf8').matchAll(/import type [^;]*?from '([^']+)'/g)].map(([, name]) => name),
  );
  const named = (name: string) => (name.startsWith('#') ? name.slice(1) : normalize(join(dirname(file), name)));
  const typeOnly = new Set([...types].map((name) => named(name ?? '')));
  return importsOf(file).filter((name) => !typeOnly.has(name));
}

/** Every file that can be reached from one, itself included. */
function reachable(from: string, imports: (file: string) => string[] = importsOf): Set<string> {
  const seen = new Set([from]);
  for (const file of seen) for (const next of imports(file)) seen.add(next);
  return seen;
}

describe('who may import whom', () => {
  it('lets nobody past the gate to the two secrets [B1]', () => {
    const past = sources
      .filter((file) => !file.startsWith('server/blind/') && file !== 'server/entities.ts')
      .filter((file) =>
        importsOf(file).some((name) => name.startsWith('server/blind/') && name !== 'server/blind/index.ts'),
      );
    expect(past).toEqual([]);
  });

  it('keeps the shape of the revealed key out of all that travels before closing [B1]', () => {
    for (const file of [
      'shared/contracts/live.ts',
      'shared/session/views.ts',
      'shared/contracts/proctor-live.ts',
      'shared/contracts/observer-live.ts',
      'shared/session/observer-view.ts',
    ])
      expect(reachable(file)).not.toContain('shared/session/revealed-key.ts');
  });

  it('keeps a feature of the client out of every other', () => {
    const word = (file: string) => file.split('/')[2];
    const crossing = sources
      .filter((file) => file.startsWith('src/features/'))
      .filter((file) => importsOf(file).some((name) => name.startsWith('src/features/') && word(name) !== word(file)));
    expect(crossing).toEqual([]);
  });

  it('keeps the phone light: no router, forms, charts or query cache', () => {
    const heavy = [...reachable('src/listener/start.tsx', loadsOf)].filter((file) =>
      /from '(react-router-dom|react-hook-form|recharts|radix-ui|@tanstack\/react-query|zod)'/.test(
        readFileSync(file, 'utf8'),
      ),
    );
    expect(heavy).toEqual([]);
  });

  it('reads the environment where a program starts, and nowhere else', () => {
    const readers = sources.filter(
      (file) => file.startsWith('server/') && readFileSync(file, 'utf8').includes('process.env'),
    );
    expect(readers.sort()).toEqual(['server/bin/audit.ts', 'server/bin/demo-bundle.ts', 'server/main.ts']);
  });
});
