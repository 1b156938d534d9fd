/** What the stability facts mean, in sentences. Every figure in them is computed. */
import { angleText, waveText } from './angle-text';
import type { StabilityFacts, StableInterval } from './facts';
import { decimalText, limitText, raised, signed, symbolText, withSymbols } from './reading-texts';
import { capital } from './readings';

type Method = StabilityFacts['method'];

/** How a bound was obtained. */
export function methodText(method: Method, tolerance?: string | null): string {
  if (method === 'exact') return 'exact';
  const width = tolerance ? decimalText(Number(tolerance), 2) : null;
  if (method === 'certified') return width && Number(tolerance) > 0 ? `certified bracket, ${width} wide` : 'certified';
  return width ? `numeric, to ${width}` : 'numeric';
}

const endText = (end: string | null, exact: string | null) => (end === null ? null : limitText(Number(end), exact));

/** "at 1 a double root at θ = π/2 …" for the ends of an interval that are told about. */
function endSentences(interval: StableInterval, symbol: string): string[] {
  const ends = [
    { at: endText(interval.lo, interval.loExact), told: interval.loBehaviour },
    { at: endText(interval.hi, interval.hiExact), told: interval.hiBehaviour },
  ];
  const sentences = ends.flatMap(({ at, told }) => {
    if (at === null || told === null || at === '0') return [];
    const advice = told.stableAtLimit ? '' : ' Keep below it.';
    const [theta] = told.theta ?? [];
    const where = told.theta?.length === 1 && theta !== undefined ? `, decided by ${waveText(Math.abs(theta))}` : '';
    return [`At ${symbol} = ${at}${where}: ${told.why.replace(/\.$/, '')}.${advice}`];
  });
  // A mirrored interval says the same of both of its ends; the upper one is enough.
  const mirrored = interval.lo !== null && interval.hi !== null && Number(interval.lo) === -Number(interval.hi);
  return mirrored ? sentences.slice(-1) : sentences;
}

/** Single values inside and outside the intervals that behave otherwise than what surrounds them. */
function singleValueSentences({ intervals, isolatedStablePoints }: StabilityFacts, symbol: string): string[] {
  const inside = intervals.flatMap(({ interiorDefects = [] }) =>
    interiorDefects.map(
      ({ at, theta, why }) =>
        `Inside, at ${symbol} = ${decimalText(Number(at))} and ${waveText(Math.abs(theta))}: ${why.replace(/\.$/, '')}.`,
    ),
  );
  if (isolatedStablePoints.length === 0) return inside;
  const values = isolatedStablePoints.map((value) => signed(value)).join(', ');
  return [...inside, `Stable at ${symbol} = ${values} by itself, with unstable values on both sides.`];
}

const READABLE = 60;

/** The polynomial that an end without a closed form is a root of. */
function polynomialSentences(interval: StableInterval, symbol: string): string[] {
  const ends = [
    { end: interval.hi, exact: interval.hiExact, polynomial: interval.hiMinimalPolynomial },
    { end: interval.lo, exact: interval.loExact, polynomial: interval.loMinimalPolynomial },
  ];
  const told = ends.flatMap(({ end, exact, polynomial }) => {
    if (end === null || !polynomial) return [];
    const power = polynomial.replace(/\*\*(\d+)/g, (_, digits: string) => raised(digits)).replace(/\*/g, '');
    const text = signed(power).replace(/lambda|sigma|mu/g, (name) => symbolText(name));
    const form = exact ? `${signed(exact.replace(/\*/g, ' '))}, ` : '';
    return text.length <= READABLE
      ? [`${symbol} = ${decimalText(Number(end), 12)} is ${form}a root of ${text}.`]
      : exact
        ? [`${symbol} = ${decimalText(Number(end), 12)} is ${form.slice(0, -2)}.`]
        : [];
  });
  return told.slice(0, 1);
}

/** "2" → "²", "5/2" → "^(5/2)" */
const powerText = (power: string) => (power === '1' ? '' : /^\d+$/.test(power) ? raised(power) : `^(${power})`);

function growthSentence({ growth, parameter }: StabilityFacts): string | null {
  const symbol = symbolText(parameter ?? 'lambda');
  const side = growth?.positive ?? growth?.negative;
  if (!side) return null;
  const law = `the excess over 1 a step goes as ${symbol}${powerText(side.q)} for small ${symbol}`;
  const found = side.exponentMethod === 'exact' ? ' (the exponent is exact)' : ' (the exponent is numeric)';
  if (!side.at) return `${capital(law)}${found}.`;
  const steps = side.at.stepsToTenfold;
  const tenfold =
    steps === null ? '' : `, and noise is ten times as high after ${Math.ceil(steps).toLocaleString('en-GB')} steps`;
  return `${capital(law)}${found}; at ${symbol} = ${decimalText(side.at.parameter)} the worst wave grows by ${decimalText(side.at.growthPerStep, 3)} a step${tenfold}.`;
}

/** Where and how fast it is lost, for a scheme that has no stable value. */
function lossSentence({ lostAt, parameter }: StabilityFacts): string | null {
  if (!lostAt) return null;
  const symbol = symbolText(parameter ?? 'lambda');
  const [theta] = lostAt.theta;
  const wave =
    lostAt.theta.length === 1 && theta !== undefined
      ? waveText(theta)
      : `waves at θ = (${lostAt.theta.map(angleText).join(', ')})`;
  return `At ${symbol} = ${decimalText(lostAt.parameter)} ${wave} grow most: |g| = ${decimalText(lostAt.modulus, 5)}.`;
}

/** The bound in sentences: what happens at it, why it is lost, what holds in more than one direction. */
export function boundSentences(stability: StabilityFacts): string[] {
  const symbol = symbolText(stability.parameter ?? 'lambda');
  const isUnstable = stability.verdict.includes('unstable');
  const opening: Readonly<Record<string, string>> = {
    'unconditionally stable': 'No step is too long for stability; accuracy alone sets it.',
    'unstable for all nonzero values': `Unstable for every ${symbol}, however small: some wave has |g| > 1 at each value.`,
    'weakly unstable for all nonzero values': `Weakly unstable for every ${symbol}: the growth is slow enough to escape a short test, and fast enough to spoil a long run.`,
    'degenerate newest level': 'The newest level cannot be solved for at every wave.',
    'not decided within the time budget': 'The bound was not decided within the time for the analysis.',
  };
  return [
    opening[stability.verdict] ?? null,
    ...stability.intervals.flatMap((interval) => endSentences(interval, symbol)),
    ...stability.intervals.flatMap((interval) => polynomialSentences(interval, symbol)),
    ...singleValueSentences(stability, symbol),
    lossSentence(stability),
    isUnstable ? growthSentence(stability) : null,
    stability.region && withSymbols(`In general: ${stability.region}.`),
    stability.note && withSymbols(stability.note),
  ].filter((sentence): sentence is string => Boolean(sentence));
}

/** One clause beside the bound among the readings. */
export function boundClause(stability: StabilityFacts): string {
  const symbol = symbolText(stability.parameter ?? 'lambda');
  if (stability.verdict === 'unstable for all nonzero values') return `unstable for every ${symbol}; see Bound`;
  if (stability.verdict === 'weakly unstable for all nonzero values')
    return `weakly unstable for every ${symbol}; see Bound`;
  const last = stability.intervals.at(-1);
  const told = last?.hiBehaviour;
  const how = methodText(last?.method ?? stability.method, last?.tolerance);
  const at = last ? endText(last.hi, last.hiExact) : null;
  if (!told || at === null) return how;
  const why = told.why.split(':')[0]?.replace(/\.$/, '');
  return told.stableAtLimit ? `reached at ${at}; ${how}` : `${why} at ${symbol} = ${at}: keep below; ${how}`;
}
