import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { methodIds } from '#shared/methods/methods.ts';

// Adding a method must touch its own files and the list, and nothing else.

describe('a method', () => {
  it('is named by its own files, the list, the demo and the kit’s samples alone [F1]', () => {
    const named = new RegExp(`['"\`](${methodIds.join('|')})['"\`]`);
    const naming = ['shared', 'server', 'src']
      .flatMap((folder) => readdirSync(folder, { recursive: true, encoding: 'utf8' }).map((name) => join(folder, name)))
      .filter((name) => /\.tsx?$/.test(name) && named.test(readFileSync(name, 'utf8')))
      .filter((name) => !/^(shared\/methods|shared\/findings|src\/ui\/gallery)\//.test(name));
    expect(naming).toEqual(['server/demo/demo-scenario.ts']);
  });
});
