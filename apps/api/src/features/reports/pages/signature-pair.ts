import type { SignatureResponse } from '@trammel/shared/submissions';
import { momentInUtc } from '../report-words.ts';
import type { Flow } from './flow.ts';
import type { TextStyle } from './page-writer.ts';

interface Field {
  readonly title: string;
  readonly signature: SignatureResponse | null;
  readonly unsigned: string;
}

interface Line {
  readonly text: string;
  readonly style: TextStyle;
  /** Room above. */
  readonly gap: number;
}

const caption: TextStyle = { face: 'text', size: 6.5, colour: 'pencil' };
const words: TextStyle = { face: 'text', size: 8.5 };
const figures: TextStyle = { face: 'figures', size: 7.5 };
const between = 14;
const inset = 9;

/** Warrant and disposition side by side: name, role, time with zone, meaning, digest and key of each. */
export function drawSignaturePair(
  flow: Flow,
  warrant: SignatureResponse | null,
  disposition: SignatureResponse | null,
): void {
  const { pages } = flow;
  const width = (flow.width - between) / 2;
  const fields: Field[] = [
    {
      title: 'Warrant of the supplier',
      signature: warrant,
      unsigned: 'Signed by a person with the authority to sign for the supplier.',
    },
    {
      title: 'Disposition of the customer',
      signature: disposition,
      unsigned: 'Signed by the customer after the review.',
    },
  ];
  const filled = fields.map((field) => ({ ...field, lines: linesOf(flow, field, width - 2 * inset) }));
  const height = 12 + Math.max(...filled.map(({ lines }) => heightOf(lines))) + inset;
  flow.ensure(height + 10);
  const top = flow.y + 6;
  filled.forEach(({ lines, signature }, at) => {
    const left = flow.left + at * (width + between);
    pages.rectangle(left, top, width, height, 'graphite', 0.6);
    pages.rectangle(left + 2.5, top + 2.5, width - 5, height - 5, 'graphite', 0.6);
    let y = top + 8;
    for (const [index, { text, style, gap }] of lines.entries()) {
      y += gap + style.size * 1.2;
      pages.text(left + inset, y, text, style);
      if (signature !== null && index === 1) {
        pages.line(left + inset, y + 4, left + width - inset, y + 4, 'graphite', 0.6);
      }
    }
    if (signature === null) {
      pages.line(left + inset, top + height - 22, left + width - inset, top + height - 22, 'graphite', 0.6);
      pages.text(left + inset, top + height - 12, 'not signed', caption);
    }
  });
  flow.y = top + height + 6;
}

const heightOf = (lines: readonly Line[]) =>
  lines.reduce((sum, { style, gap }) => sum + gap + style.size * 1.2, 0);

function linesOf({ pages }: Flow, { title, signature, unsigned }: Field, width: number): Line[] {
  const wrapped = (text: string, style: TextStyle, gap: number): Line[] =>
    pages.wrap(text, width, style).map((line, at) => ({ text: line, style, gap: at === 0 ? gap : 0 }));
  const head = { text: title, style: caption, gap: 0 };
  if (signature === null) return [head, ...wrapped(unsigned, { ...words, colour: 'pencil' }, 24)];
  return [
    head,
    ...wrapped(signature.name, { face: 'strong', size: 13 }, 8),
    ...wrapped(`${signature.role}, ${signature.organisation}`, words, 8),
    ...wrapped(momentInUtc(signature.signedAt), { ...figures, size: 8.5 }, 2),
    ...wrapped(signature.meaning, words, 5),
    { text: 'Digest (SHA-256) of what was signed', style: caption, gap: 5 },
    ...wrapped(signature.digest.replace(/^.{32}/, '$&\n'), figures, 1),
    { text: 'Key', style: caption, gap: 3 },
    ...wrapped(signature.keyId, figures, 1),
  ];
}
