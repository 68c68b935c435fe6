/** A place in the grid: row and column, counted from 0. */
export interface Place {
  readonly row: number;
  readonly column: number;
}

/** The active cell and the corner a selection was drawn from. */
export interface Selection {
  readonly active: Place;
  readonly anchor: Place;
}

export interface Size {
  readonly rows: number;
  readonly columns: number;
}

const within = (value: number, most: number) => Math.min(Math.max(value, 0), Math.max(0, most - 1));

export function moveTo(selection: Selection, to: Place, size: Size, extend: boolean): Selection {
  const active = { row: within(to.row, size.rows), column: within(to.column, size.columns) };
  return { active, anchor: extend ? selection.anchor : active };
}

/** Tab and Shift+Tab run through the row and on into the next. */
export function stepAlong(place: Place, by: 1 | -1, size: Size): Place {
  const column = place.column + by;
  if (column >= size.columns) return place.row + 1 < size.rows ? { row: place.row + 1, column: 0 } : place;
  if (column < 0) return place.row > 0 ? { row: place.row - 1, column: size.columns - 1 } : place;
  return { row: place.row, column };
}

export interface Range {
  readonly top: number;
  readonly bottom: number;
  readonly left: number;
  readonly right: number;
}

export function rangeOf({ active, anchor }: Selection): Range {
  return {
    top: Math.min(active.row, anchor.row),
    bottom: Math.max(active.row, anchor.row),
    left: Math.min(active.column, anchor.column),
    right: Math.max(active.column, anchor.column),
  };
}

export function isWithin(range: Range, row: number, column: number): boolean {
  return row >= range.top && row <= range.bottom && column >= range.left && column <= range.right;
}
