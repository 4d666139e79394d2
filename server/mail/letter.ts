/**
 * What a letter says, once, in an order of blocks; its plain text and its HTML are both made from it, so that neither can say or link
 * to anything the other does not.
 */
export type Letter = { readonly subject: string; readonly blocks: readonly Block[] };

export type Block =
  | { readonly kind: 'text'; readonly text: string }
  /** A link on a line of its own; `href` is a whole address. */
  | { readonly kind: 'link'; readonly label: string; readonly href: string }
  /** Somebody's own words; their line breaks are kept. */
  | { readonly kind: 'quote'; readonly text: string }
  /** What the letter is and how to be rid of it; set apart at the foot. */
  | { readonly kind: 'foot'; readonly text: string };

export function text(words: string): Block {
  return { kind: 'text', text: words };
}

export function link(label: string, href: string): Block {
  return { kind: 'link', label, href };
}

export function quote(words: string): Block {
  return { kind: 'quote', text: words };
}

export function foot(words: string): Block {
  return { kind: 'foot', text: words };
}

/** One line, whatever it was made from: a header is ended by a line break. */
export function subjectOf({ subject }: Letter): string {
  return subject.replaceAll(/[\p{Cc}\u2028\u2029]+/gu, ' ').trim();
}

export function textOf({ blocks }: Letter): string {
  return `${blocks.map(asText).join('\n\n')}\n`;
}

/**
 * A page that reads the same with styles stripped, in dark and in light: it names no colour, no width and no picture, and the mail
 * program chooses.
 */
export function htmlOf(letter: Letter): string {
  return [
    '<!doctype html>',
    '<html lang="en">',
    '<head>',
    '<meta charset="utf-8">',
    '<meta name="color-scheme" content="light dark">',
    `<title>${escapeHtml(subjectOf(letter))}</title>`,
    '</head>',
    '<body>',
    ...letter.blocks.map(asHtml),
    '</body>',
    '</html>',
    '',
  ].join('\n');
}

function asText(block: Block): string {
  switch (block.kind) {
    case 'text':
      return block.text;
    case 'link':
      return `${block.label}:\n${block.href}`;
    case 'quote':
      return linesOf(block.text)
        .map((line) => `> ${line}`.trimEnd())
        .join('\n');
    case 'foot':
      return `-- \n${block.text}`;
  }
}

function asHtml(block: Block): string {
  switch (block.kind) {
    case 'text':
      return `<p>${escapeHtml(block.text)}</p>`;
    case 'link':
      // The address stands there as well: some programs take links apart, and a careful reader looks before following.
      return `<p><a href="${escapeHtml(block.href)}">${escapeHtml(block.label)}</a><br>${escapeHtml(block.href)}</p>`;
    case 'quote':
      return `<blockquote>${linesOf(block.text).map(escapeHtml).join('<br>')}</blockquote>`;
    case 'foot':
      return `<hr>\n<p><small>${escapeHtml(block.text)}</small></p>`;
  }
}

function linesOf(words: string): string[] {
  return words.split(/\r\n|[\n\r\u2028\u2029]/);
}

const ENTITIES: Readonly<Record<string, string>> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };

function escapeHtml(words: string): string {
  return words.replaceAll(/[&<>"']/g, (sign) => ENTITIES[sign] ?? sign);
}
