// What a browser calls itself holds the names of several; the first that fits, in this order, is its own.
const browsers: readonly [RegExp, string][] = [
  [/Edg\w*\//, 'Edge'],
  [/OPR\//, 'Opera'],
  [/Firefox\/|FxiOS\//, 'Firefox'],
  [/Chrome\/|CriOS\//, 'Chrome or Chromium'],
  [/Safari\//, 'Safari'],
];
const systems: readonly [RegExp, string][] = [
  [/iPhone/, 'iPhone'],
  [/iPad/, 'iPad'],
  [/Android/, 'Android'],
  [/Windows/, 'Windows'],
  [/Mac OS X/, 'macOS'],
  [/Linux/, 'Linux'],
];

const firstIn = (list: readonly [RegExp, string][], text: string) => list.find(([sign]) => sign.test(text))?.[1];

/** "Firefox on Linux", from what a browser says of itself. */
export function browserWords(userAgent: string): string {
  const browser = firstIn(browsers, userAgent) ?? 'A browser';
  const system = firstIn(systems, userAgent);
  return system === undefined ? browser : `${browser} on ${system}`;
}
