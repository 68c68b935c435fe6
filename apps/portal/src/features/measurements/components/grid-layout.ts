/** Sizes of the grid in pixels; the height of a row is the `row` step of the spacing scale. */
export const layout = { head: 470, narrowHead: 56, cell: 84, row: 32, header: 56 } as const;
