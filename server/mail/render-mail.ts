import type { MailContent } from './mails.ts';

const escapes: Readonly<Record<string, string>> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' };
const escaped = (text: string) => text.replace(/[&<>"]/g, (character) => escapes[character] ?? character);

export function plainTextOf({ paragraphs, action, footer }: MailContent): string {
  const link = action === null ? [] : [`${action.label}:\n${action.url}`];
  return `${[...paragraphs, ...link, `--\n${footer}`].join('\n\n')}\n`;
}

/** Carries its looks in itself and loads nothing, so that opening it tells nobody. */
export function htmlOf({ subject, paragraphs, action, footer }: MailContent): string {
  const text = paragraphs.map((paragraph) => `<p style="margin:0 0 16px">${escaped(paragraph)}</p>`).join('');
  const link =
    action === null
      ? ''
      : `<p style="margin:24px 0 8px"><a href="${escaped(action.url)}" style="display:inline-block;padding:12px 20px;background:#a2481f;color:#ffffff;border-radius:6px;font-weight:600;text-decoration:none">${escaped(action.label)}</a></p><p style="margin:0 0 24px;color:#4d5b56;font-size:14px;overflow-wrap:anywhere">${escaped(action.url)}</p>`;
  return `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width"><title>${escaped(subject)}</title></head><body style="margin:0;padding:24px;background:#edf1ef;color:#13201d;font:16px/1.5 sans-serif"><div style="max-width:560px;margin:0 auto;padding:32px;background:#ffffff;border-radius:6px"><p style="margin:0 0 24px;font-weight:700">Fairlead</p>${text}${link}<p style="margin:24px 0 0;padding-top:16px;border-top:1px solid #c9d3cf;color:#4d5b56;font-size:14px">${escaped(footer)}</p></div></body></html>`;
}
