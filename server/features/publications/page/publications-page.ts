import type { PublicationRow } from '#shared/contracts/publications.ts';
import { type Html, html } from './html.ts';
import { frame, utc } from './page-parts.ts';

type PublicationList = { rows: readonly PublicationRow[]; page: number; pages: number };

/** What is published here, newest first. */
export function publicationsContent({ rows, page, pages }: PublicationList): Html {
  const items = rows.map(
    ({ id, headline, title, publisher, publishedAt, isWithdrawn }) =>
      html`<li class="flex flex-col gap-1.5 border-b border-rule py-5">
        <h2 class="text-xl"><a href="/p/${id}">${headline}</a></h2>
        <p class="text-soft">${isWithdrawn ? 'Withdrawn. ' : ''}${title}, published ${utc(publishedAt)} by ${publisher}</p>
      </li>`,
  );
  return frame(
    'Published results',
    html`<h1 class="pb-8 text-3xl">Published results</h1>
      ${rows.length === 0 ? html`<p class="text-soft">Nothing is published here yet.</p>` : html`<ul class="max-w-4xl border-t-2 border-ink">${items}</ul>`}
      ${page < pages ? html`<p class="pt-6"><a href="/p?page=${page + 1}">Older</a></p>` : null}`,
  );
}
