/** A block of cells as spreadsheets put it on the clipboard: tabs between cells, line ends between rows. */
export function parseBlock(text: string): string[][] {
  const rows: string[][] = [];
  let row: string[] = [];
  let cell = '';
  let quoted = false;
  const endCell = () => {
    row.push(cell.trim());
    cell = '';
  };
  const endRow = () => {
    endCell();
    rows.push(row);
    row = [];
  };
  for (let at = 0; at < text.length; at += 1) {
    const sign = text.charAt(at);
    if (quoted) {
      if (sign !== '"') cell += sign;
      else if (text.charAt(at + 1) === '"') {
        cell += '"';
        at += 1;
      } else quoted = false;
    } else if (sign === '"' && cell === '') quoted = true;
    else if (sign === '\t') endCell();
    else if (sign === '\n') endRow();
    else if (sign !== '\r') cell += sign;
  }
  if (cell !== '' || row.length > 0) endRow();
  return rows;
}

export function formatBlock(rows: readonly (readonly (string | null)[])[]): string {
  return rows.map((row) => row.map((text) => text ?? '').join('\t')).join('\n');
}
