import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';

// What no screen, mail, file or reply may say of a result. Comments are for developers and are left out.

const never =
  /\bproves?\b|\bproven\b|identical|cannot be heard|inaudible|95\s?% sure|probability of guessing|transparent/i;
/** Of a clock and not of a result; and a colour's name. */
const otherwise = /proves? nothing about time|[\w\]:-]+-transparent|color: transparent/g;

const sources = ['shared', 'server', 'src']
  .flatMap((folder) => readdirSync(folder, { recursive: true, encoding: 'utf8' }).map((name) => join(folder, name)))
  .filter((name) => /\.(tsx?|css|html|txt|R)$/.test(name) && !name.endsWith('.d.ts'));

const isComment = (line: string) => /^\s*(\/\/|\*|\/\*|#)/.test(line);

describe('what is said', () => {
  it('has none of the words that no finding may use [T8]', () => {
    const found = sources.flatMap((file) =>
      readFileSync(file, 'utf8')
        .split('\n')
        .map((line, index) => ({ line, at: `${file}:${index + 1}` }))
        .filter(({ line }) => !isComment(line) && never.test(line.replaceAll(otherwise, '')))
        .map(({ at }) => at),
    );
    expect(found).toEqual([]);
    expect(sources.length).toBeGreaterThan(400);
  });
});
