/** Markup that is safe to send; made by `html` alone. */
export class Html {
  readonly text: string;

  constructor(text: string) {
    this.text = text;
  }
}

type Piece = Html | string | number | null | readonly Piece[];

const entities: { readonly [character: string]: string } = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

const escaped = (text: string) => text.replace(/[&<>"']/g, (character) => entities[character] ?? character);

function textOf(piece: Piece): string {
  if (piece === null) return '';
  if (piece instanceof Html) return piece.text;
  if (typeof piece === 'object') return piece.map(textOf).join('');
  return escaped(String(piece));
}

/** A template in which every value is escaped, unless it is markup made by the same function; null is nothing. */
export function html(strings: TemplateStringsArray, ...pieces: readonly Piece[]): Html {
  return new Html(strings.reduce((text, part, index) => text + textOf(pieces[index - 1] ?? null) + part));
}

/** Data for machines inside a page; it cannot end the element that holds it. */
export function jsonScript(type: string, value: unknown): Html {
  return new Html(`<script type="${type}">${JSON.stringify(value).replaceAll('<', '\\u003c')}</script>`);
}
