import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { type Html, html } from './html.ts';

export type PageHead = {
  readonly title: string;
  readonly description: string;
  readonly canonical: string;
  readonly data: Html | null;
};

const bare =
  '<!doctype html><html lang="en"><head><meta charset="utf-8" /><title>Fairlead</title></head><body><div id="root"></div></body></html>';

/** The client's page as it was built; without a build, a page that has the words and no looks. */
function builtPage(clientDir: string): string {
  const file = join(clientDir, 'index.html');
  return existsSync(file) ? readFileSync(file, 'utf8') : bare;
}

/**
 * The client's page with a head and words of its own: readable as it arrives, and taken over by the application where
 * JavaScript runs.
 */
export function shellPage(clientDir: string, head: PageHead, content: Html): string {
  const { title, description, canonical, data } = head;
  const tags = html`<title>${title}</title>
    <meta name="description" content="${description}" />
    <link rel="canonical" href="${canonical}" />
    <meta property="og:type" content="article" />
    <meta property="og:title" content="${title}" />
    <meta property="og:description" content="${description}" />
    <meta property="og:url" content="${canonical}" />
    ${data}`;
  // Functions as replacements: a "$" in somebody's words is no pattern.
  return builtPage(clientDir)
    .replace(/<title>.*?<\/title>/s, () => tags.text)
    .replace(/<noscript>.*?<\/noscript>/s, () => '')
    .replace('<div id="root"></div>', () => `<div id="root">${content.text}</div>`);
}
