/** Grids on which trials march: points along x, y, z, as many numbers as there are dimensions, x running fastest. */

export const pointsOf = (grid: readonly number[]): number => grid.reduce((product, n) => product * n, 1);

/** The sizes of a task: in one dimension n alone. */
export const sized = (grid: readonly number[]): { n: number; grid?: readonly number[] } =>
  grid.length === 1 ? { n: grid[0]! } : { n: pointsOf(grid), grid };

/** "64", "13 x 9" */
export const gridText = (grid: readonly number[]) => grid.join(' x ');

/** Index of the point that lies these offsets from point `at` of a periodic grid. */
export function neighbour(grid: readonly number[], at: number, offsets: readonly number[]): number {
  let rest = at;
  let index = 0;
  let stride = 1;
  grid.forEach((n, axis) => {
    const place = rest % n;
    rest = Math.floor(rest / n);
    index += stride * ((((place + (offsets[axis] ?? 0)) % n) + n) % n);
    stride *= n;
  });
  return index;
}

/** Every set of whole waves around the grid, one of each pair that differs by its sign alone; the mean is left out. */
export function wavesAround(grid: readonly number[]): number[][] {
  const last = grid.length - 1;
  const counts = grid.reduce<number[][]>(
    (sets, n, axis) =>
      sets.flatMap((set) => {
        const from = axis === last ? 0 : -Math.floor((n - 1) / 2);
        return Array.from({ length: Math.floor(n / 2) - from + 1 }, (_, k) => [...set, from + k]);
      }),
    [[]],
  );
  return counts.filter((set) => set.some((count) => count !== 0));
}

/** Angles a point of whole waves around the grid: a number in one dimension. */
export function anglesOf(counts: readonly number[], grid: readonly number[]): number | readonly number[] {
  const angles = counts.map((count, axis) => (2 * Math.PI * count) / grid[axis]!);
  return angles.length === 1 ? angles[0]! : angles;
}
