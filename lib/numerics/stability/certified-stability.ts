/**
 * Stability bounds in rational brackets, for schemes whose exact critical values would take too long: a scan in
 * double precision says where to look; what is reported is decided by exact arithmetic at rational values on both
 * sides of each end, over all waves. Between the sampled values inside an interval nothing is proved.
 */
import { decimalText } from '../algebraic-number';
import type { ScalarScheme } from '../canonical-scheme';
import { type Rational, rational, toNumber } from '../rational';
import { components } from './critical-values';
import { crossingCurve } from './crossing-curve';
import { DOUBLE_ROOT, sideOf, SIMPLE_ROOTS, TWO_LEVEL } from './exact-stability';
import { decideGap, type MultipleRoots } from './gap-survey';
import { rootsOf, worstWave } from './limit-behaviour';
import type { EndBehaviour, StabilityOutcome, StableInterval, WorkBudget } from './stability-result';
import { atParameter, rootCount, sampled, type WavePolynomial, wavePolynomial } from './wave-polynomial';
import { WorkLimitReached, workMeter } from './work-meter';

const SMALLEST = 1 / 256;
const LARGEST = 1024;
const RATIO = 1.15;
/** Exact decisions inside each stretch that the scan finds stable. */
const INSIDE = 5;
/** Half the width of a bracket, and the grid of its ends. */
const HALF_WIDTH = 2e-11;
const WIDTH_MAX = 1e-10;
const DENOMINATOR_BITS = 42;
/** Growth that the scan takes for rounding near double roots. */
const SCAN_TOLERANCE = 1e-7;

const onGrid = (x: number): Rational =>
  rational(BigInt(Math.round(x * 2 ** DENOMINATOR_BITS)), 1n << BigInt(DENOMINATOR_BITS));

/** A fraction with a numerator of eight bits next to a value: exact decisions are quickest at short fractions. */
function shortFraction(x: number): Rational {
  const shift = 7 - Math.floor(Math.log2(Math.abs(x)));
  const num = BigInt(Math.round(x * 2 ** shift));
  return shift >= 0 ? rational(num, 1n << BigInt(shift)) : rational(num << BigInt(-shift));
}

class Prover {
  /** Whether no sampled wave grows; ends at the first that does. */
  readonly looksStable: (parameter: number) => boolean;

  constructor(
    readonly wave: WavePolynomial,
    readonly check: () => void,
    readonly multipleRoots: MultipleRoots,
  ) {
    const coefficients = sampled(wave);
    const count = 12 * (wave.span + 3);
    this.looksStable = (parameter) => {
      check();
      const levelsAt = coefficients(parameter);
      // From short waves to long ones: most unstable values are told by the first.
      for (let k = count; k >= 0; k--) {
        const theta = wave.real ? (Math.PI * k) / count : Math.PI * ((2 * k) / count - 1);
        if (rootsOf(levelsAt(theta)).some(([re, im]) => !(Math.hypot(re, im) <= 1 + SCAN_TOLERANCE))) return false;
      }
      return true;
    };
  }

  /** Exact, over all waves. */
  isStable(parameter: Rational): boolean {
    this.check();
    const there = atParameter(this.wave, parameter.num, parameter.den);
    if (!there || there.levels.at(-1)!.length === 0) return false;
    const curve = crossingCurve(there, this.check);
    return decideGap(there, curve, components(curve, this.check), rational(0n), this.check, this.multipleRoots).stable;
  }

  /** Ends of a bracket [stable, unstable], both decided exactly, at most WIDTH_MAX apart. */
  bracket(stable: number, unstable: number): [Rational, Rational] {
    let [inside, outside] = [stable, unstable];
    while (Math.abs(outside - inside) > 1e-12 * Math.abs(inside)) {
      const middle = (inside + outside) / 2;
      if (middle === inside || middle === outside) break;
      if (this.looksStable(middle)) inside = middle;
      else outside = middle;
    }
    const step = Math.sign(unstable - stable) * HALF_WIDTH;
    let [good, bad] = [onGrid(stable), onGrid(unstable)];
    for (const guess of [onGrid(inside - step), onGrid(inside + step)]) {
      if (!between(guess, good, bad)) continue;
      if (this.isStable(guess)) good = guess;
      else bad = guess;
    }
    while (Math.abs(toNumber(bad) - toNumber(good)) > WIDTH_MAX) {
      const middle = onGrid((toNumber(good) + toNumber(bad)) / 2);
      if (this.isStable(middle)) good = middle;
      else bad = middle;
    }
    return [good, bad];
  }
}

function between(x: Rational, a: Rational, b: Rational): boolean {
  const [value, one, other] = [toNumber(x), toNumber(a), toNumber(b)];
  return value > Math.min(one, other) && value < Math.max(one, other);
}

interface Stretch {
  /** On the line of |p|; null means that it reaches 0 or has no end. */
  readonly lo: readonly [Rational, Rational] | null;
  readonly hi: readonly [Rational, Rational] | null;
}

/** Stable stretches on one half of the line. */
function stretches(prover: Prover, sign: 1 | -1): Stretch[] {
  const values: number[] = [];
  for (let value = SMALLEST; value < LARGEST; value *= RATIO) values.push(sign * toNumber(shortFraction(value)));
  const looks = values.map((value) => prover.looksStable(value));
  const found: Stretch[] = [];
  for (let from = 0; from < values.length; from++) {
    if (!looks[from]) continue;
    let to = from;
    while (to + 1 < values.length && looks[to + 1]) to++;
    const picks = [
      ...new Set(Array.from({ length: INSIDE }, (_, k) => Math.round(from + ((to - from) * k) / (INSIDE - 1)))),
    ];
    // What a scan cannot see at small values, exact arithmetic does: very small values are asked too.
    const proved = picks.map((k) => prover.isStable(shortFraction(values[k]!)));
    const nearZero = from === 0 && proved[0] === true && prover.isStable(rational(BigInt(sign), 1_000_000n));
    const far =
      to === values.length - 1 && proved.at(-1) === true && prover.isStable(rational(BigInt(sign) * 1_000_000n));
    for (let k = 0; k < picks.length; k++) {
      if (!proved[k]) continue;
      let last = k;
      while (last + 1 < picks.length && proved[last + 1]) last++;
      const before = k > 0 ? picks[k - 1]! : from - 1;
      const after = last + 1 < picks.length ? picks[last + 1]! : to + 1;
      found.push({
        lo: k === 0 && nearZero ? null : prover.bracket(values[picks[k]!]!, values[before] ?? sign * 1e-6),
        hi:
          last === picks.length - 1 && far ? null : prover.bracket(values[picks[last]!]!, values[after] ?? sign * 1e6),
      });
      k = last;
    }
    from = to;
  }
  return found;
}

/** Whether roots meet on the circle at an end: their least distance near the wave that grows just outside. */
function behaviourAtBracket(wave: WavePolynomial, [good, bad]: readonly [Rational, Rational]): EndBehaviour {
  if (rootCount(wave) === 1) return { stableAtLimit: true, why: TWO_LEVEL };
  const at = toNumber(good);
  const { theta } = worstWave(wave, at + Math.sign(toNumber(bad) - at) * Math.max(1e-6, 1e-6 * Math.abs(at)));
  const levelsAt = sampled(wave)(at);
  const separation = (angle: number) => {
    const unit = rootsOf(levelsAt(angle)).filter(([re, im]) => Math.abs(Math.hypot(re, im) - 1) < 1e-3);
    let least = Infinity;
    unit.forEach(([re, im], k) =>
      unit.slice(0, k).forEach(([a, b]) => (least = Math.min(least, Math.hypot(re - a, im - b)))),
    );
    return least;
  };
  let best = theta;
  for (let step = 0.02; step > 1e-9; step /= 2)
    for (const angle of [best - step, best + step]) if (separation(angle) < separation(best)) best = angle;
  return separation(best) < 1e-4
    ? { stableAtLimit: false, why: DOUBLE_ROOT, theta: [Math.abs(best)] }
    : { stableAtLimit: true, why: SIMPLE_ROOTS };
}

function endOf(wave: WavePolynomial, bracket: Stretch['lo']) {
  if (!bracket) return { text: null, behaviour: null, width: 0 };
  const [good, bad] = bracket;
  return {
    text: decimalText(good.num, good.den, 12),
    behaviour: behaviourAtBracket(wave, bracket),
    width: Math.abs(toNumber(bad) - toNumber(good)),
  };
}

function intervalOf(wave: WavePolynomial, low: Stretch['lo'] | 'zero', high: Stretch['lo'] | 'zero'): StableInterval {
  const lo = low === 'zero' ? { text: '0', behaviour: null, width: 0 } : endOf(wave, low);
  const hi = high === 'zero' ? { text: '0', behaviour: null, width: 0 } : endOf(wave, high);
  const width = Math.max(lo.width, hi.width);
  return {
    lo: lo.text,
    hi: hi.text,
    loIncluded: lo.text === null ? null : (lo.behaviour?.stableAtLimit ?? true),
    hiIncluded: hi.text === null ? null : (hi.behaviour?.stableAtLimit ?? true),
    loExact: lo.text === '0' ? '0' : null,
    hiExact: hi.text === '0' ? '0' : null,
    loBehaviour: lo.behaviour,
    hiBehaviour: hi.behaviour,
    method: 'certified',
    tolerance: width > 0 ? width.toExponential(1) : null,
  };
}

/** Both halves put together; stretches that reach 0 from both sides are one interval. */
function joined(wave: WavePolynomial, negative: Stretch[], positive: Stretch[]): StableInterval[] {
  const below = negative.find(({ lo }) => lo === null);
  const above = positive.find(({ lo }) => lo === null);
  const middle: StableInterval[] =
    below && above
      ? [intervalOf(wave, below.hi, above.hi)]
      : below
        ? [intervalOf(wave, below.hi, 'zero')]
        : above
          ? [intervalOf(wave, 'zero', above.hi)]
          : [];
  return [
    ...negative
      .filter((each) => each !== below)
      .reverse()
      .map(({ lo, hi }) => intervalOf(wave, hi, lo)),
    ...middle,
    ...positive.filter((each) => each !== above).map(({ lo, hi }) => intervalOf(wave, lo, hi)),
  ];
}

/** All stable intervals found by a scan, each end in a rational bracket at most 1e-10 wide, both its ends decided exactly. */
export function certifiedIntervals(
  scheme: ScalarScheme,
  budget: WorkBudget,
  multipleRoots: MultipleRoots = 'growth',
): StabilityOutcome {
  const wave = wavePolynomial(scheme);
  if (typeof wave === 'string') return { kind: 'unsupported', why: wave };
  if (rootCount(wave) < 1) return { kind: 'unsupported', why: 'The scheme has one time level only.' };
  try {
    const prover = new Prover(wave, workMeter(budget), multipleRoots);
    const side = sideOf(scheme);
    const intervals = joined(wave, side === 'both' ? stretches(prover, -1) : [], stretches(prover, 1));
    const only = intervals[0];
    const everywhere = intervals.length === 1 && only!.hi === null && only!.lo === (side === 'both' ? null : '0');
    const outside = intervals.map(({ hi }) => hi).find((hi) => hi !== null && Number(hi) > 0);
    const loss = everywhere
      ? null
      : {
          parameter: outside ? Number(outside) * 1.01 : 0.4,
          ...worstWave(wave, outside ? Number(outside) * 1.01 : 0.4),
        };
    return {
      kind: 'decided',
      result: {
        verdict: everywhere
          ? 'unconditionally stable'
          : intervals.length > 0
            ? 'conditionally stable'
            : 'unstable for all nonzero values',
        intervals,
        isolatedStablePoints: [],
        lostAt: loss && { parameter: loss.parameter, theta: [loss.theta], modulus: loss.modulus },
        method: 'certified',
        note: null,
      },
    };
  } catch (error) {
    if (error instanceof WorkLimitReached) return { kind: 'work-limit', why: error.message };
    throw error;
  }
}
