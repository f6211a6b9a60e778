/** A bounded piece of a list. */
export interface PageRequest {
  /** how many rows at most, 1 to 200 */
  limit: number;
  /** how many rows to pass over */
  offset: number;
}

export interface Page<Row> extends PageRequest {
  items: Row[];
  /** rows there are in all */
  total: number;
}

/** What `findAndCountAll` returns -> a page. */
export function toPage<Row>(
  found: { rows: Row[]; count: number },
  request: PageRequest,
): Page<Row> {
  return { items: found.rows, total: found.count, limit: request.limit, offset: request.offset };
}
