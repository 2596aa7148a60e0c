// Slow and plain: a determinant by expansion along the first row.

export function determinant(rows: readonly (readonly bigint[])[]): bigint {
  if (rows.length === 0) return 1n;
  let total = 0n;
  rows[0]!.forEach((entry, column) => {
    const minor = rows.slice(1).map((row) => row.filter((_, j) => j !== column));
    total += (column % 2 === 0 ? entry : -entry) * determinant(minor);
  });
  return total;
}

/** All subsets of `size` items, in order. */
export function* subsets<T>(items: readonly T[], size: number, from = 0): Generator<T[]> {
  if (size === 0) yield [];
  else {
    for (let i = from; i <= items.length - size; i += 1) {
      for (const rest of subsets(items, size - 1, i + 1)) yield [items[i]!, ...rest];
    }
  }
}
