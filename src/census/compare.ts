// A check: one claim with the values that independent routes gave for it.
import type { Check } from './record.js';

/** Null unless two routes or more have a value. */
export function compare(
  claim: string,
  routes: readonly (readonly [string, bigint | string | null])[],
): Check | null {
  const known = routes.flatMap(([route, value]) =>
    value === null ? [] : [{ route, value: String(value) }],
  );
  if (known.length < 2) return null;
  return { claim, routes: known, agrees: known.every(({ value }) => value === known[0].value) };
}
