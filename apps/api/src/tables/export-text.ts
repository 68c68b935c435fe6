/** A text cell that a spreadsheet program would run as a formula gets a quotation mark in front; numbers stay numbers. */
export function safeText(text: string): string {
  return /^[=+\-@\t\r\0]/.test(text) && !/^[+-]?(?:\d+(?:\.\d*)?|\.\d+)$/.test(text) ? `'${text}` : text;
}

/** The text without the mark that `safeText` put there, so that an exported file imports unchanged. */
export function unguardedText(text: string): string {
  return /^'[=+\-@\t\r]/.test(text) ? text.slice(1) : text;
}

const quoted = (text: string): string =>
  /[",\r\n;]/.test(text) || /^\s|\s$/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;

/** RFC 4180 with a byte order mark, so that spreadsheet programs read the letters right. */
export function writeCsv(rows: readonly (readonly string[])[]): string {
  return `\uFEFF${rows.map((row) => row.map((cell) => quoted(safeText(cell))).join(',')).join('\r\n')}\r\n`;
}
