/** Text of a grid's cells by their place in what they read as, such as `stream.light.C1`. */
export type Cells = Readonly<Record<string, string>>;

/** Places of a grid's cells, row by row; `null` where the grid has none. */
export type Grid = readonly (readonly (string | null)[])[];

/**
 * Rows and columns of what a spreadsheet puts on the clipboard.
 *
 * @returns  `null` for one single figure, which its field takes by itself
 */
export function cellsOfClipboard(text: string): string[][] | null {
  const lines = text.replace(/\r\n?/g, "\n").replace(/\n+$/, "").split("\n");
  const rows = lines.map((line) =>
    line.split("\t").map((cell) => cell.trim().replace(/^"(.*)"$/, "$1")),
  );
  return rows.length > 1 || rows[0].length > 1 ? rows : null;
}

/** Rows become columns: for a table that a laboratory prints the other way round. */
export const turned = (rows: readonly (readonly string[])[]): string[][] =>
  Array.from({ length: Math.max(0, ...rows.map((row) => row.length)) }, (_, column) =>
    rows.map((row) => row[column] ?? ""),
  );

/**
 * Lays a block over the grid from one cell on, to the right and down. Cells that the grid does not have are left out;
 * empty cells of the block empty theirs.
 *
 * @returns  the new texts by place, and how many filled cells of the block found none
 */
export function fillFrom(
  grid: Grid,
  start: string,
  block: readonly (readonly string[])[],
): { changes: Cells; leftOut: number } {
  const top = grid.findIndex((row) => row.includes(start));
  const left = top < 0 ? -1 : grid[top].indexOf(start);
  const changes: Record<string, string> = {};
  let leftOut = 0;
  block.forEach((row, down) =>
    row.forEach((text, across) => {
      const place = top < 0 ? null : (grid[top + down]?.[left + across] ?? null);
      if (place !== null) changes[place] = text;
      else if (text !== "") leftOut += 1;
    }),
  );
  return { changes, leftOut };
}

/** The cell that an arrow key or Enter goes to; `null` at the edge. */
export function neighbour(grid: Grid, from: string, rowStep: 1 | -1): string | null {
  const row = grid.findIndex((places) => places.includes(from));
  if (row < 0) return null;
  const column = grid[row].indexOf(from);
  for (let next = row + rowStep; grid[next] !== undefined; next += rowStep) {
    const place = grid[next][column] ?? null;
    if (place !== null) return place;
  }
  return null;
}
