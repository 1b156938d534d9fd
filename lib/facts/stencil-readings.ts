/** The readings of a stencil and of a time method. */
import type { StencilFacts, TimeMethodFacts } from './facts';
import { decimalText, limitText, raised, signed } from './reading-texts';
import { angleText } from './angle-text';
import { type Reading, counted } from './readings';

const pointsAWave = (theta: number) => decimalText((2 * Math.PI) / theta, 3);

/** The coefficient of the leading error, and what it stands before. */
function errorReading({ leadingError }: StencilFacts): Reading[] {
  if (!leadingError) return [];
  const power = leadingError.hPower === 1 ? 'Δx' : `Δx${raised(String(leadingError.hPower))}`;
  if (leadingError.terms) {
    const terms = Object.entries(leadingError.terms).map(([word, value]) => `${signed(value)} u_${word}`);
    return [{ term: 'Leading error', value: power, how: `times ${terms.join(' + ')}; approximation minus derivative` }];
  }
  const of = `times ${power} and the derivative of order ${leadingError.derivative}; approximation minus derivative`;
  return [{ term: 'Leading error', value: signed(leadingError.coefficient ?? ''), how: of }];
}

const haloText = (halo: StencilFacts['halo']) =>
  (Array.isArray(halo[0]) ? (halo as [number, number][]) : [halo as [number, number]])
    .map(([left, right]) => `${left} | ${right}`)
    .join(', ');

function bandwidthReadings({ modifiedWavenumber }: StencilFacts): Reading[] {
  const band = modifiedWavenumber?.resolvedBandwidthComplex;
  const top = modifiedWavenumber?.maxRe;
  const readings: Reading[] = [];
  for (const [eps, name] of [
    ['0.01', '1 %'],
    ['0.001', '0.1 %'],
  ] as const) {
    const theta = band?.[eps];
    if (theta === undefined) continue;
    readings.push({
      term: `Good to ${name}`,
      value: `θ ≤ ${angleText(theta)}`,
      how: `at least ${pointsAWave(theta)} points a wave; error of the complex κ, first exit`,
    });
  }
  if (top) {
    readings.push({
      term: 'Largest κ',
      value: decimalText(top.value),
      how: `at θ = ${angleText(top.theta)}: sets the step of the method of lines`,
    });
  }
  return readings;
}

export function stencilReadings(facts: StencilFacts): Reading[] {
  return [
    {
      term: 'Order',
      value: facts.order === null ? (facts.consistent ? 'exact' : 'none') : String(facts.order),
      how: facts.consistent
        ? 'exact, from the moments of the weights'
        : `does not approximate the derivative: moment ${facts.firstViolatedMoment} is off by ${signed(facts.momentResidual ?? '')}`,
    },
    ...errorReading(facts),
    ...(facts.nominal
      ? [
          {
            term: 'Nominal order',
            value: String(facts.nominal.order),
            how: `with the weights as printed: ${facts.nominal.rule}`,
          },
        ]
      : []),
    { term: 'Symmetry', value: facts.symmetry, how: 'about the point of evaluation' },
    { term: 'Points', value: String(facts.points), how: 'with a weight other than zero' },
    {
      term: 'Halo',
      value: haloText(facts.halo),
      how: facts.extent
        ? `reaches ${signed(facts.extent[0])} left and ${signed(facts.extent[1])} right`
        : 'per dimension',
    },
    {
      term: 'Coupling',
      value: facts.explicit ? 'explicit' : 'implicit',
      how: facts.explicit ? 'one weighted sum a point' : 'one banded system a line',
    },
    ...bandwidthReadings(facts),
    {
      term: 'Flops a point',
      value: String(facts.cost.operations),
      how: `${counted(facts.cost.additions, 'sum')}, ${counted(facts.cost.multiplications, 'product')}`,
    },
  ];
}

const limitReading = (term: string, limit: string | null, exact: string | null, how: string): Reading => ({
  term,
  value: limit === null ? 'no limit' : limitText(Number(limit), exact),
  how,
});

export function timeMethodReadings(facts: TimeMethodFacts): Reading[] {
  const registers = [
    facts.registersLowStorage === null ? null : `${facts.registersLowStorage} in low-storage form`,
    facts.registersAccumulating === null ? null : `${facts.registersAccumulating} when sums are accumulated`,
  ].filter((text) => text !== null);
  return [
    {
      term: 'Order',
      value: String(facts.orderLinear),
      how:
        facts.orderNonlinear === null || facts.orderNonlinear === facts.orderLinear
          ? 'on linear and nonlinear problems; exact order conditions'
          : `on linear problems; ${facts.orderNonlinear} on nonlinear ones`,
    },
    ...(facts.orderNominal !== null && facts.orderNominal !== facts.orderLinear
      ? [{ term: 'Nominal order', value: String(facts.orderNominal), how: 'with the decimals as printed' }]
      : []),
    ...(facts.stages === null
      ? []
      : [{ term: 'Stages', value: String(facts.stages), how: 'evaluations of the right side a step' }]),
    ...(facts.steps === null
      ? []
      : [{ term: 'Steps', value: String(facts.steps), how: `needs ${counted(facts.startUpSteps, 'starting step')}` }]),
    {
      term: 'Coupling',
      value: facts.explicit ? 'explicit' : 'implicit',
      how: facts.explicit ? 'no system to solve' : 'a system to solve each step',
    },
    limitReading(
      'On the imaginary axis',
      facts.imaginaryLimit,
      facts.imaginaryLimitExact,
      'largest step times frequency for undamped waves',
    ),
    limitReading('On the real axis', facts.realLimit, facts.realLimitExact, 'largest step times rate for pure decay'),
    {
      term: 'Zero-stable',
      value: facts.zeroStable ? 'yes' : 'no',
      how: facts.zeroStable ? 'errors stay bounded as the step shrinks' : 'errors grow however small the step',
    },
    ...(facts.registersGeneral === null
      ? []
      : [
          {
            term: 'Arrays',
            value: String(facts.registersGeneral),
            how: ['one a stage and the state', ...registers].join('; '),
          },
        ]),
  ];
}
