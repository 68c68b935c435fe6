import { acceptedFiles } from '@trammel/shared/documents';

export type FilePurpose = keyof typeof acceptedFiles;

/** How much of the beginning is looked at. */
export const headBytes = 64 * 1024;
const mostPixels = 250_000_000;

interface FileKind {
  readonly mediaType: string;
  readonly extensions: readonly string[];
}

const kinds: Record<FilePurpose, FileKind[]> = {
  drawing: kindsOf(acceptedFiles.drawing),
  evidence: kindsOf(acceptedFiles.evidence),
};

function kindsOf(table: Record<string, readonly string[]>): FileKind[] {
  return Object.entries(table).map(([mediaType, extensions]) => ({ mediaType, extensions }));
}

const programs =
  /\.(?:exe|com|bat|cmd|scr|pif|msi|js|jse|vbs|vbe|wsf|ps1|hta|lnk|jar|sh|php|html?|xhtml|svg|dll|cpl)$/i;

/** Browsers and their systems disagree about the types of data files; a type that would be run is never believed. */
const neverDeclared =
  /^(?:text\/html|image\/svg\+xml|application\/(?:xhtml\+xml|javascript|x-msdownload|x-sh)|text\/javascript)/i;

export type FileVerdict = { readonly mediaType: string } | { readonly refused: string };

/** Whether a name could mislead the person who opens the file elsewhere; the stored key never comes from it. */
export function hostileName(name: string): string | null {
  if (name.trim() === '') return 'The file has no name.';
  if ([...name].length > 200) return 'The file name is longer than 200 characters.';
  if (/\p{Cc}/u.test(name)) return 'The file name holds control characters.';
  if (/[\u202A-\u202E\u2066-\u2069\u200E\u200F]/u.test(name))
    return 'The file name hides its ending by turning the direction of writing.';
  if (/[. ]$/.test(name)) return 'The file name ends with a dot or a blank.';
  if (/[/\\]/.test(name)) return 'The file name holds a path.';
  const stem = name.replace(/\.[^.]*$/, '');
  if (programs.test(stem)) return 'The file name has the ending of a program before its own.';
  return null;
}

/** Name, declared type and first bytes must tell one story; otherwise the reason, in words for the sender. */
export function judgeFile(
  purpose: FilePurpose,
  name: string,
  declaredType: string,
  head: Buffer,
): FileVerdict {
  const hostile = hostileName(name);
  if (hostile) return { refused: `${hostile} Rename it and send it again.` };
  const extension = (/\.[^.]+$/.exec(name)?.[0] ?? '').toLowerCase();
  const kind = kinds[purpose].find((one) => one.extensions.includes(extension));
  if (!kind) {
    const list = kinds[purpose].flatMap((one) => one.extensions).join(', ');
    return { refused: `Files ending in ${extension || 'nothing'} are not taken here. Taken are ${list}.` };
  }
  if (head.length === 0) return { refused: 'The file is empty.' };
  if (neverDeclared.test(declaredType))
    return { refused: `The file was sent as ${declaredType}, which is not taken.` };
  const known = [...kinds.evidence, ...kinds.drawing].find(
    (one) => one.mediaType === declaredType.split(';')[0]?.trim(),
  );
  const textLike = (type: string) => type.startsWith('text/') || type === 'application/json';
  if (known && known.mediaType !== kind.mediaType && !(textLike(known.mediaType) && looksLikeText(head))) {
    return { refused: `The file was sent as ${declaredType} but its name ends in ${extension}.` };
  }
  const fault = contentFault(kind.mediaType, head);
  return fault ? { refused: `The name ends in ${extension}, but ${fault}` } : { mediaType: kind.mediaType };
}

function contentFault(mediaType: string, head: Buffer): string | null {
  switch (mediaType) {
    case 'application/pdf':
      return head.subarray(0, 1024).includes('%PDF-') ? null : 'the content is not a PDF.';
    case 'image/png':
      return pngFault(head);
    case 'image/jpeg':
      return jpegFault(head);
    case 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet':
      return packageFault(head, 'xl/', 'a spreadsheet of this kind.');
    case 'application/vnd.openxmlformats-officedocument.wordprocessingml.document':
      return packageFault(head, 'word/', 'a document of this kind.');
    case 'model/step':
      return asText(head).trimStart().startsWith('ISO-10303-21') ? null : 'the content is not a STEP file.';
    case 'application/json':
      return looksLikeText(head) && /^\s*[[{]/.test(asText(head)) ? null : 'the content is not JSON.';
    case 'application/xml':
      return xmlFault(head);
    default:
      return looksLikeText(head) ? null : 'the content is not text.';
  }
}

function pngFault(head: Buffer): string | null {
  const signature = Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]);
  if (head.length < 24 || !head.subarray(0, 8).equals(signature)) return 'the content is not a PNG image.';
  return pixelFault(head.readUInt32BE(16), head.readUInt32BE(20));
}

function jpegFault(head: Buffer): string | null {
  if (head.length < 4 || head[0] !== 0xff || head[1] !== 0xd8) return 'the content is not a JPEG image.';
  for (let at = 2; at + 9 < head.length && head[at] === 0xff;) {
    const marker = head[at + 1] ?? 0;
    const isFrame = marker >= 0xc0 && marker <= 0xcf && marker !== 0xc4 && marker !== 0xc8 && marker !== 0xcc;
    if (isFrame) return pixelFault(head.readUInt16BE(at + 7), head.readUInt16BE(at + 5));
    at += 2 + head.readUInt16BE(at + 2);
  }
  return null;
}

function pixelFault(width: number, height: number): string | null {
  return width * height <= mostPixels
    ? null
    : `the image has ${width} × ${height} pixels, more than can be shown.`;
}

function packageFault(head: Buffer, folder: string, name: string): string | null {
  const isZip = head.subarray(0, 4).equals(Buffer.from([0x50, 0x4b, 0x03, 0x04]));
  const told = head.includes('[Content_Types].xml') || head.includes(folder) || head.includes('_rels/.rels');
  return isZip && told ? null : `the content is not ${name}`;
}

function xmlFault(head: Buffer): string | null {
  const text = asText(head);
  if (!looksLikeText(head) || !/^\uFEFF?\s*</.test(text)) return 'the content is not XML.';
  if (/<(?:\w+:)?(?:html|svg)\b|http:\/\/www\.w3\.org\/(?:1999\/xhtml|2000\/svg)/i.test(text)) {
    return 'the content is a page or an image that a browser would run.';
  }
  return null;
}

function looksLikeText(head: Buffer): boolean {
  const marked =
    head.length >= 2 && ((head[0] === 0xff && head[1] === 0xfe) || (head[0] === 0xfe && head[1] === 0xff));
  const binary = [
    Buffer.from('MZ'),
    Buffer.from('PK\x03\x04', 'latin1'),
    Buffer.from('%PDF-'),
    Buffer.from('\x7fELF', 'latin1'),
  ];
  if (binary.some((magic) => head.subarray(0, magic.length).equals(magic))) return false;
  return marked || !head.includes(0);
}

/** UTF-16 is turned only as far as the checks above need it. */
function asText(head: Buffer): string {
  return head[0] === 0xff && head[1] === 0xfe ? head.toString('utf16le') : head.toString('utf8');
}
