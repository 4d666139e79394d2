import { describe, expect, test } from 'vitest';
import { foot, htmlOf, link, quote, subjectOf, text, textOf } from '#server/mail/letter.ts';
import type { Letter } from '#server/mail/letter.ts';

const LETTER: Letter = {
  subject: 'A mark was read anew',
  blocks: [
    text('The third letter could be O or D.'),
    link('See the reading', 'http://127.0.0.1:5080/readings/7?from=mail&at=2'),
    quote('It looks like this:\n  <O> & "D"'),
    foot('Pourbook'),
  ],
};

describe('a letter', () => {
  test('as plain text keeps its order, its links and the lines of a quotation', () => {
    expect(textOf(LETTER)).toBe(
      [
        'The third letter could be O or D.',
        '',
        'See the reading:',
        'http://127.0.0.1:5080/readings/7?from=mail&at=2',
        '',
        '> It looks like this:',
        '>   <O> & "D"',
        '',
        '-- ',
        'Pourbook',
        '',
      ].join('\n'),
    );
  });

  test('as HTML says the same with every sign of markup escaped', () => {
    const html = htmlOf(LETTER);
    expect(html).toContain('<p>The third letter could be O or D.</p>');
    expect(html).toContain('<a href="http://127.0.0.1:5080/readings/7?from=mail&amp;at=2">See the reading</a>');
    expect(html).toContain('<blockquote>It looks like this:<br>  &lt;O&gt; &amp; &quot;D&quot;</blockquote>');
  });

  test.each([
    ['<script>alert(1)</script>', '&lt;script&gt;alert(1)&lt;/script&gt;'],
    ['"><img src=x onerror=alert(1)>', '&quot;&gt;&lt;img src=x onerror=alert(1)&gt;'],
    [`' onmouseover='x`, '&#39; onmouseover=&#39;x'],
    ['&lt;', '&amp;lt;'],
  ])('keeps %s what it is: text', (words, escaped) => {
    const html = htmlOf({ subject: words, blocks: [text(words), quote(words), foot(words), link(words, `https://register.example/${words}`)] });
    expect(html.split(escaped)).toHaveLength(8);
    expect(html).not.toMatch(/<script|<img|onmouseover='/);
  });

  test('names no colour, no style, no picture and nothing to load', () => {
    expect(htmlOf(LETTER)).not.toMatch(/style|color:|bgcolor|<img|src=|<link|@import/i);
  });

  test.each(['Hello\r\nBcc: other@elsewhere.example', 'Hello\nBcc: other@elsewhere.example', 'Hello\u2028Bcc: other@elsewhere.example', 'Hello\0\u0085Bcc: other@elsewhere.example'])(
    'has one line of subject',
    (subject) => {
      expect(subjectOf({ ...LETTER, subject })).toBe('Hello Bcc: other@elsewhere.example');
    },
  );
});
