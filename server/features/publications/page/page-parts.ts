import { type Html, html } from './html.ts';

// The looks of the served pages: the application's own tokens and classes, in plain markup.

const months = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

/** "3 Mar 2026, 09:12 UTC": the server does not know the reader's zone. */
export function utc(iso: string): string {
  const at = new Date(iso);
  return `${at.getUTCDate()} ${months[at.getUTCMonth()]} ${at.getUTCFullYear()}, ${iso.slice(11, 16)} UTC`;
}

/** "1 trial", "16 trials" */
export const count = (of: number, one: string) => `${of} ${one}${of === 1 ? '' : 's'}`;

export function frame(context: string, content: Html): Html {
  return html`<div class="flex min-h-dvh flex-col">
    <header class="border-b border-rule">
      <div class="mx-auto flex w-full max-w-[86rem] flex-wrap items-center gap-x-6 gap-y-1 px-5 py-4 sm:px-8 lg:px-12">
        <a href="/" class="font-bold no-underline hover:underline">Fairlead</a>
        <span class="text-soft">${context}</span>
      </div>
    </header>
    <main id="content" class="mx-auto w-full max-w-[86rem] flex-1 px-5 py-8 sm:px-8 lg:px-12 lg:py-12">${content}</main>
  </div>`;
}

export function section(title: string, content: Html): Html {
  return html`<section class="flex min-w-0 flex-col gap-4"><h2 class="text-xl">${title}</h2>${content}</section>`;
}

export function list(items: readonly (string | Html)[], none: string): Html {
  if (items.length === 0) return html`<p class="text-soft">${none}</p>`;
  return html`<ul class="flex max-w-4xl list-disc flex-col gap-1 pl-6">${items.map((item) => html`<li>${item}</li>`)}</ul>`;
}

export function facts(rows: readonly { label: string; value: string | Html }[]): Html {
  return html`<dl class="max-w-4xl border-t-2 border-ink">${rows.map(
    ({ label, value }) =>
      html`<div class="grid gap-x-6 border-b border-rule py-2 sm:grid-cols-[14rem_minmax(0,1fr)]"><dt class="text-soft">${label}</dt><dd class="min-w-0 whitespace-pre-line [overflow-wrap:anywhere]">${value}</dd></div>`,
  )}</dl>`;
}

export function table(caption: string, head: readonly string[], rows: readonly (readonly (string | number)[])[]): Html {
  return html`<div class="overflow-x-auto"><table class="border-collapse">
    <caption class="sr-only">${caption}</caption>
    <thead><tr>${head.map((cell) => html`<th scope="col" class="border-b border-edge py-2 pr-6 text-left">${cell}</th>`)}</tr></thead>
    <tbody>${rows.map(
      ([first, ...rest]) =>
        html`<tr><th scope="row" class="border-b border-rule py-2 pr-6 text-left font-semibold">${first ?? ''}</th>${rest.map(
          (cell) => html`<td class="border-b border-rule py-2 pr-6">${cell}</td>`,
        )}</tr>`,
    )}</tbody>
  </table></div>`;
}
