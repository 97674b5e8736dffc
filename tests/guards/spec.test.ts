import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';

const filesBelow = (folder: string) =>
  readdirSync(folder, { recursive: true, encoding: 'utf8' }).map((name) => join(folder, name));

describe('the spec', () => {
  const rules = filesBelow('docs/spec')
    .filter((name) => name.endsWith('.md'))
    .flatMap((name) => [...readFileSync(name, 'utf8').matchAll(/^- \*\*([A-Z]\d+)\*\*/gm)].map(([, rule]) => rule));
  const tests = filesBelow('tests')
    .filter((name) => /\.(test|spec)\.ts$/.test(name))
    .map((name) => readFileSync(name, 'utf8'))
    .join('\n');

  it('numbers each rule once', () => {
    expect(rules.length).toBeGreaterThan(20);
    expect(rules.filter((rule, index) => rules.indexOf(rule) !== index)).toEqual([]);
  });

  it('has a test that cites each rule', () => {
    expect(rules.filter((rule) => !tests.includes(`[${rule}]`))).toEqual([]);
  });

  it('has every rule that a test cites', () => {
    const cited = [...tests.matchAll(/\[([A-Z]\d+)\]/g)].map(([, rule]) => rule);
    expect([...new Set(cited)].filter((rule) => !rules.includes(rule))).toEqual([]);
  });
});
