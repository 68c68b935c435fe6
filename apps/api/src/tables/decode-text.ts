import { TableRefused } from './table.ts';

export type TextEncoding = 'utf-8' | 'utf-16le' | 'utf-16be' | 'windows-1252';

/** The encoding the bytes suggest: byte order mark, zero bytes of plain letters, then whether they are valid UTF-8. */
export function suggestEncoding(bytes: Uint8Array): TextEncoding {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return 'utf-16le';
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return 'utf-16be';
  if (bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf) return 'utf-8';
  const head = bytes.subarray(0, 4000);
  let even = 0;
  let odd = 0;
  for (let i = 0; i < head.length; i += 1) {
    if (head[i] !== 0) continue;
    if (i % 2 === 0) even += 1;
    else odd += 1;
  }
  if (odd > head.length / 4 && even < odd / 4) return 'utf-16le';
  if (even > head.length / 4 && odd < even / 4) return 'utf-16be';
  try {
    new TextDecoder('utf-8', { fatal: true }).decode(bytes);
    return 'utf-8';
  } catch {
    return 'windows-1252';
  }
}

/** The text without its byte order mark. Bytes that the encoding does not know show as the replacement character. */
export function decodeText(bytes: Uint8Array, encoding: TextEncoding): string {
  const text = new TextDecoder(encoding).decode(bytes);
  let controls = 0;
  const seen = Math.min(text.length, 20_000);
  for (let i = 0; i < seen; i += 1) {
    const code = text.charCodeAt(i);
    if (code < 32 && code !== 9 && code !== 10 && code !== 13 && code !== 12) controls += 1;
  }
  if (controls > seen / 100) {
    throw new TableRefused(
      'The file is not readable as text in this encoding.',
      'Choose another encoding, or send the table as CSV or XLSX.',
    );
  }
  return text;
}
