/** What every fact means and how it is found, for the page of definitions and the links to it. */

export interface FactDefinition {
  /** Anchor on the page. */
  readonly id: string;
  readonly title: string;
  /** Readings of sheets that this is the definition of. */
  readonly terms: readonly string[];
  /** Paragraphs. */
  readonly text: readonly string[];
  /** How the engine comes to it, and what "exact", "certified" and "numeric" mean for it. */
  readonly obtained: string;
}

export interface DefinitionChapter {
  readonly title: string;
  readonly definitions: readonly FactDefinition[];
}

export const DEFINITION_CHAPTERS: readonly DefinitionChapter[] = [
  {
    title: 'How a fact was obtained',
    definitions: [
      {
        id: 'obtained',
        title: 'Exact, certified, numeric',
        terms: [],
        text: [
          'Exact: computed in fractions of whole numbers, or as a root of a polynomial with whole coefficients that is known to lie between two fractions. Decimals shown beside it are rounded from that.',
          'Certified: an end of an interval lies between two fractions; the stable side is proved by exact arithmetic over all waves, and on the unstable side one wave is shown to grow.',
          'Numeric: sampled and refined in double precision, with the tolerance beside it. A numeric bound may be wrong by its tolerance, and by a band of waves narrower than the search resolves.',
        ],
        obtained: 'Every reading names its way.',
      },
    ],
  },
  {
    title: 'What a definition may be',
    definitions: [
      {
        id: 'forms',
        title: 'Table, lines, system',
        terms: [],
        text: [
          'A table lists coefficients of u at levels n+1, n, … and offsets; their sum is 0. Lines give one stencil for each term of the operator, in the order of the equation, and a method in time. A system gives one table for each unknown, in the order of the update, and may stand at half levels.',
          'Offsets that are halves are taken as staggered grids: levels that lie half a spacing apart are brought onto one grid by the factor exp(iθ/2), which changes no modulus.',
          'Runge–Kutta methods step u_t = f and are therefore refused for u_tt in lines: the equation has to be given as a system of first order, as a table, or with a multistep method read as Σ α u = Δt² Σ β f. Methods that are partly implicit (IMEX) need an operator of two terms of which the second is stiff: they are accepted for advection–diffusion, advection explicit and diffusion implicit, and refused elsewhere.',
        ],
        obtained:
          'Definitions that do not hold are refused with the place as a pointer and, in expressions, the column.',
      },
    ],
  },
  {
    title: 'Stencils',
    definitions: [
      {
        id: 'stencil-order',
        title: 'Order and leading error of a stencil',
        terms: ['Leading error', 'Nominal order'],
        text: [
          'The order p is the power of h in approximation minus derivative = C hᵖ u⁽ᵐ⁺ᵖ⁾ + …, and C with its derivative is the leading error. For a compact stencil the residual of the row is divided by the sum of the coefficients of its left side.',
          'Interpolation at one of the nodes has no error at all: its order is "exact". In several dimensions the order is the smallest total degree beyond that of the operator at which some Taylor coefficient is off.',
          'Printed decimals satisfy the conditions only to their rounding. The nominal order counts a condition as met where its residual is no larger than one unit in the last printed digit of every weight could make it.',
        ],
        obtained: 'Exact, from the moments of the weights in rational arithmetic.',
      },
      {
        id: 'wavenumber',
        title: 'Modified wavenumber and resolved band',
        terms: ['Largest κ', 'Good to 1 %', 'Good to 0.1 %'],
        text: [
          'θ is the wavenumber times the grid spacing, from 0 to π. The stencil takes the wave exp(iθx) to S(θ) times itself, and κ = S / iᵐ stands where the exact derivative has θᵐ. For a first derivative the real part moves the wave, the imaginary part damps or amplifies it.',
          'The resolved band ends at the first θ where |κ/θᵐ − 1| passes the error named. The largest value of Re κ sets the step that a method of lines may take.',
        ],
        obtained: 'Curves and band in double precision from exact weights.',
      },
      {
        id: 'symmetry',
        title: 'Symmetry, points and halo',
        terms: ['Symmetry', 'Points', 'Halo'],
        text: [
          'Only weights other than zero count. Symmetry is about the point of evaluation. The reach is the largest offset on each side; the halo is the reach rounded up to whole spacings, and is what ghost cells must provide.',
        ],
        obtained: 'Counted.',
      },
    ],
  },
  {
    title: 'Accuracy of schemes',
    definitions: [
      {
        id: 'order',
        title: 'Order in time, in space, at a fixed number',
        terms: ['Order', 'Order in time', 'Order in space'],
        text: [
          'The exact wave of the equation is put into the scheme and what remains is divided by the coefficient of the time derivative. Expanded for small Δt and Δx apart, the lowest pure powers of Δt and of Δx are the orders in time and in space.',
          'With the dimensionless number held fixed, Δt follows Δx, and the remainder has one order. Where some term has a power of a step below the line, such as Δx²/Δt, the scheme is consistent only while that term tends to 0: it is conditionally consistent.',
          'Some values of the number raise the order or make the scheme exact. They are the roots of the leading coefficient.',
        ],
        obtained: 'Exact, from truncated power series over the rational numbers with the parameters as unknowns.',
      },
      {
        id: 'modified-equation',
        title: 'Modified equation',
        terms: ['Adds'],
        text: [
          'The scheme solves, to all orders, an equation with further terms d_j of the derivatives of order j. d_j is the coefficient of (iθ)ʲ in the logarithm of the principal root less that of the exact one, so that the term is d_j Δxʲ/Δt times the derivative (for second order in time over Δt²).',
          'Even derivatives damp or amplify short waves, odd ones move them at the wrong speed. In several dimensions ∂x, ∂y, ∂z stand for the derivatives.',
        ],
        obtained: 'Exact coefficients; their meaning in words is read at the value named.',
      },
    ],
  },
  {
    title: 'Stability',
    definitions: [
      {
        id: 'stability',
        title: 'Bound and intervals',
        terms: ['Bound'],
        text: [
          'At a value of the number a scheme is stable if for every wave all roots z of its amplification polynomial satisfy |z| ≤ 1 and those on the unit circle are simple (for systems: semisimple). The double root z = 1 at θ = 0 of equations of second order in time is exempt, since u = a + bt solves them.',
          'Intervals are those of |z| ≤ 1. At an end a multiple root on the circle lets one wave grow in proportion to the number of steps; the end then does not belong to the stable values, and the sheet says so. The value 0 alone does not count.',
          'This is von Neumann analysis: constant coefficients, periodic or unbounded domains. With boundaries, variable coefficients or nonlinear terms it is necessary and not always sufficient.',
        ],
        obtained:
          'One dimension and one number: exact, by the curve on which a root meets the circle, its critical values, and the reduction of Schur, Cohn and Miller at one fraction in each gap; certified where that takes too long. Multiple roots at an end: exact at rational ends and the waves 0, π/2 and π, elsewhere with 77 digits. Several dimensions: numeric to 10⁻⁹, the ends then recognised among the exact ends on lines of waves.',
      },
      {
        id: 'weak',
        title: 'Unstable and weakly unstable',
        terms: [],
        text: [
          'Where no value but 0 is stable, the growth a step behaves like K times the q-th power of p for small values p. Weakly unstable means q > 2: with Δt no larger than a multiple of Δx to the power q/(q−1) a run of fixed length stays bounded, and a short test shows nothing. q = 0 is a method that is unstable even without space.',
          'Steps to tenfold is ln 10 over the logarithm of the growth a step.',
        ],
        obtained:
          'The exponent from the exact series in one dimension, else from series in double precision; the factor K in double precision; growth at a chosen value in double precision, refined over all waves.',
      },
      {
        id: 'region',
        title: 'Regions of several numbers',
        terms: [],
        text: [
          'With two numbers and more the stable values form a region. The map shows it on a grid; the bounds with all numbers equal and with one number alone are computed like those of one number. A condition in closed form is shown only where it is a known one and agrees with the engine at every point of a sample.',
        ],
        obtained: 'Map and condition numeric; cuts at fixed values exact where their line says so.',
      },
      {
        id: 'damping',
        title: 'Damping and dissipation',
        terms: ['Damping'],
        text: [
          'A scheme is dissipative of order 2s in the sense of Kreiss if |z| ≤ 1 − δ|θ|²ˢ for all waves and all roots. The exponent is that of −ln|z| of the principal root at small θ, and holds only if every root stays inside the circle away from θ = 0. Lax–Friedrichs has g(π) = −1 and is not dissipative in this sense.',
          'Conservative means that every root of every wave keeps its modulus below the bound.',
        ],
        obtained: 'The exponent exactly, at the value named; the largest modulus on a grid of waves.',
      },
      {
        id: 'speed',
        title: 'Phase speed, group speed, decay',
        terms: [],
        text: [
          'The principal root is the one that tends to 1 with θ, followed continuously from there. Its phase speed is its argument over that of the exact solution, its group speed the ratio of their derivatives by θ, its decay the ratio of the logarithms of the moduli.',
        ],
        obtained: 'Double precision, along the ray of waves named.',
      },
      {
        id: 'modes',
        title: 'Roots and computational modes',
        terms: ['Other modes', 'Time levels', 'Roots a wave'],
        text: [
          'A scheme over L levels has L − 1 roots for each wave. Those beyond what the equation itself has (one, or two for u_tt) are computational modes. Steps needed to start are the levels that the initial values do not give.',
        ],
        obtained: 'Counted.',
      },
    ],
  },
  {
    title: 'Storage and cost',
    definitions: [
      {
        id: 'arrays',
        title: 'Arrays, sweep, rolling buffer, registers',
        terms: ['Arrays', 'With a buffer', 'Sweep', 'Registers'],
        text: [
          'In place, a scheme over L levels needs L − 1 arrays if the oldest level is read only at the point being written, or only on one side in some order of the sweep; else L. With a rolling buffer L − 1 always suffice, at the price of a few saved rows. Work arrays of a solver are not counted.',
          'Runge–Kutta methods need s + 2 registers in general, fewer where stages can be accumulated, two where the tableau has the form of Williamson. Systems keep one array for each unknown.',
        ],
        obtained: 'Counted.',
      },
      {
        id: 'cost',
        title: 'Operations, bytes, pace of a machine',
        terms: ['Flops a point', 'Bytes a point'],
        text: [
          'Additions and multiplications for each point and step, with coefficients computed outside the loop. Each array is loaded and stored once a step; a store that misses the cache counts twice, since the line is fetched first.',
          'Where the memory is the limit, a machine that moves B bytes a second updates at most B over bytes-a-point points a second.',
        ],
        obtained: 'Counted.',
      },
    ],
  },
];

const ANCHORS = new Map(
  DEFINITION_CHAPTERS.flatMap(({ definitions }) =>
    definitions.flatMap(({ id, terms }) => terms.map((term) => [term, id])),
  ),
);

/** Address of the definition of a reading; null where a reading has none. */
export function definitionAddress(term: string): string | null {
  const id = ANCHORS.get(term);
  return id ? `/definitions#${id}` : null;
}
