/** Where a thing was read: a file (or option) name, and line and column name where there are any. */
export interface Place {
  readonly source: string;
  readonly line?: number;
  readonly column?: string;
}

/** Write a place the way messages show it: `bands.csv:7 position`. */
export function formatPlace(place: Place): string {
  const line = place.line === undefined ? "" : `:${place.line}`;
  const column = place.column === undefined ? "" : ` ${place.column}`;
  return `${place.source}${line}${column}`;
}
