/**
 * Reduction of integer lattices (Lenstra, Lenstra & Lovász, Math. Ann. 261 (1982) 515–534) in the all-integer form
 * of Cohen, A Course in Computational Algebraic Number Theory (1993), algorithm 2.6.7; for the few small vectors
 * that the search for minimal polynomials needs.
 */

const dot = (a: readonly bigint[], b: readonly bigint[]) => a.reduce((sum, c, k) => sum + c * b[k]!, 0n);

function nearest(a: bigint, b: bigint): bigint {
  const twice = 2n * a + b;
  const quotient = twice / (2n * b);
  return twice < 0n && twice % (2n * b) !== 0n ? quotient - 1n : quotient;
}

/** @param rows linearly independent; @returns a reduced basis of the same lattice, a shortest-like vector first */
export function reducedLattice(rows: readonly (readonly bigint[])[], check: () => void = () => undefined): bigint[][] {
  const b = rows.map((row) => [...row]);
  const n = b.length;
  const d: bigint[] = new Array<bigint>(n + 1).fill(1n);
  const lambda = b.map(() => new Array<bigint>(n).fill(0n));
  // d[k + 1] is the Gram determinant of the first k + 1 vectors; lambda[k][j] = d[j + 1] · mu_kj.
  const orthogonalize = (k: number) => {
    for (let j = 0; j <= k; j++) {
      let u = dot(b[k]!, b[j]!);
      for (let i = 0; i < j; i++) u = (d[i + 1]! * u - lambda[k]![i]! * lambda[j]![i]!) / d[i]!;
      if (j < k) lambda[k]![j] = u;
      else d[k + 1] = u;
    }
  };
  const reduce = (k: number, l: number) => {
    const pivot = d[l + 1]!;
    const twice = 2n * lambda[k]![l]!;
    if ((twice < 0n ? -twice : twice) <= pivot) return;
    const q = nearest(lambda[k]![l]!, pivot);
    b[k] = b[k]!.map((c, i) => c - q * b[l]![i]!);
    lambda[k]![l]! -= q * pivot;
    for (let i = 0; i < l; i++) lambda[k]![i]! -= q * lambda[l]![i]!;
  };
  const exchange = (k: number, most: number) => {
    [b[k], b[k - 1]] = [b[k - 1]!, b[k]!];
    for (let j = 0; j < k - 1; j++) [lambda[k]![j], lambda[k - 1]![j]] = [lambda[k - 1]![j]!, lambda[k]![j]!];
    const mu = lambda[k]![k - 1]!;
    const size = (d[k - 1]! * d[k + 1]! + mu * mu) / d[k]!;
    for (let i = k + 1; i <= most; i++) {
      const t = lambda[i]![k]!;
      lambda[i]![k] = (d[k + 1]! * lambda[i]![k - 1]! - mu * t) / d[k]!;
      lambda[i]![k - 1] = (size * t + mu * lambda[i]![k]!) / d[k + 1]!;
    }
    d[k] = size;
  };
  let most = 0;
  orthogonalize(0);
  for (let k = 1; k < n;) {
    check();
    if (k > most) {
      most = k;
      orthogonalize(k);
    }
    reduce(k, k - 1);
    const mu = lambda[k]![k - 1]!;
    if (4n * (d[k + 1]! * d[k - 1]! + mu * mu) < 3n * d[k]! * d[k]!) {
      exchange(k, most);
      k = Math.max(1, k - 1);
    } else {
      for (let l = k - 2; l >= 0; l--) reduce(k, l);
      k++;
    }
  }
  return b;
}
