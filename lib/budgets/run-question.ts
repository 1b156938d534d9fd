/** A run as it is asked in the user's own units: texts as typed, the run they mean, and what is wrong with them. */
import type { NumericScheme } from '@/lib/numerics/numeric-scheme';
import { CONVENTIONS, type Equation } from '@/lib/numerics/equation';
import { readNumber } from '@/lib/shortlist/number-text';
import { decays } from '@/lib/shortlist/run-error';
import { type QuantityKind, readQuantity } from './quantity';
import type { Run, Tolerance } from './run';

export const RUN_FIELDS = [
  'extent',
  'speed',
  'wave',
  'time',
  'error',
  'number',
  'spacing',
  'smallest',
  'node',
  'nodes',
  'diffusivity',
] as const;
export type RunField = (typeof RUN_FIELDS)[number];

export interface RunQuestion {
  readonly texts: Readonly<Record<RunField, string>>;
  readonly faults: Readonly<Partial<Record<RunField, string>>>;
  /** null while there is a fault. */
  readonly run: Omit<Run, 'diffusion'> | null;
  readonly tolerance: Tolerance;
  /** Wanted parameter; null: nine tenths of the bound. */
  readonly parameter: number | null;
  /** Wanted spacing, m; null: the coarsest that holds the error. */
  readonly spacing: number | null;
  /** Of the diffusion that shares the step, m²/s. */
  readonly diffusivity: number | null;
}

/** The kind of the coefficient that stands in the place of a speed. */
const COEFFICIENT: Readonly<Record<1 | 2 | 3 | 4, QuantityKind>> = {
  1: 'speed',
  2: 'diffusivity',
  3: 'dispersivity',
  4: 'hyperdiffusivity',
};
const isTravelling = (equation: Equation) => equation.startsWith('advection') || equation.startsWith('wave');
export const coefficientKind = (equation: Equation): QuantityKind =>
  isTravelling(equation) ? 'speed' : COEFFICIENT[CONVENTIONS[equation].spaceOrder];

const LARGEST: Readonly<Partial<Record<QuantityKind, readonly [number, string]>>> = {
  speed: [3e8, 'faster than light'],
  diffusivity: [1e8, 'beyond any material'],
  length: [1e12, 'longer than the way to Saturn'],
  time: [1e13, 'longer than three hundred thousand years'],
  frequency: [1e16, 'beyond visible light'],
};

/** What the fields say before anyone has typed, by kind of equation. */
export function defaultTexts(equation: Equation): Record<RunField, string> {
  const { dims } = CONVENTIONS[equation];
  const common = { number: '', spacing: '', smallest: '1', node: '180 GB/s, 96 GB', nodes: '1', diffusivity: '' };
  if (isTravelling(equation))
    return {
      ...common,
      extent: ['6000 m', '6000 m × 1200 m', '600 m × 600 m × 300 m'][dims - 1]!,
      speed: '1500 m/s',
      wave: '100 Hz',
      time: dims === 3 ? '600 m' : '6 km',
      error: '30°',
    };
  return {
    ...common,
    extent: ['10 m', '10 m × 10 m', '10 m × 10 m × 5 m'][dims - 1]!,
    speed: { 1: '', 2: '1e-6 m²/s', 3: '1 m³/s', 4: '1e-6 m⁴/s' }[CONVENTIONS[equation].spaceOrder],
    wave: '0.5 m',
    time: { 1: '', 2: '2 h', 3: '0.02 s', 4: '1 min' }[CONVENTIONS[equation].spaceOrder],
    error: '1 %',
  };
}

const split = (text: string, by: RegExp) => text.split(by).filter((part) => part.trim() !== '');

/** @param valueOf the value of a name in the address, undefined where it is absent */
export function readRunQuestion(
  valueOf: (name: string) => string | undefined,
  scheme: Pick<NumericScheme, 'equation'>,
): RunQuestion {
  const { equation } = scheme;
  const { dims } = CONVENTIONS[equation];
  const defaults = defaultTexts(equation);
  const texts = Object.fromEntries(RUN_FIELDS.map((name) => [name, valueOf(name) ?? defaults[name]])) as Record<
    RunField,
    string
  >;
  const faults: Partial<Record<RunField, string>> = {};
  const quantity = (name: RunField, text: string, kinds: readonly QuantityKind[], accepted: string) => {
    const read = readQuantity(text, kinds, accepted);
    if (typeof read === 'string') {
      faults[name] ??= read;
      return null;
    }
    const largest = LARGEST[read.kind];
    if (largest && read.value > largest[0]) {
      faults[name] ??= `${text.trim()} is ${largest[1]}; are the units mixed up? Accepted: ${accepted}.`;
      return null;
    }
    return read;
  };

  const coefficient = coefficientKind(equation);
  const speedWords = isTravelling(equation)
    ? 'a speed such as 1500 m/s, or several: 300 m/s, 1500 m/s'
    : `a coefficient such as ${defaults.speed}`;
  const speeds = split(texts.speed || ' ', /[;,](?=\s)|\band\b/)
    .map((text) => quantity('speed', text, [coefficient], speedWords)?.value)
    .filter((value) => value !== undefined)
    .sort((a, b) => b - a);
  if (texts.speed.trim() === '') faults.speed = `Nothing is given. Accepted: ${speedWords}.`;
  const [fastest] = speeds;
  const slowest = speeds.at(-1);

  const lengths = ['a length', 'two lengths', 'three lengths'][dims - 1]!;
  const extentWords = `${lengths} such as ${defaults.extent}`;
  const parts = split(texts.extent, /[×x*;]|\bby\b/i);
  const unit = parts
    .map((part) => readNumber(part)?.unit)
    .filter(Boolean)
    .at(-1);
  const extents = parts.map(
    (part) =>
      quantity('extent', /[a-zµ]/i.test(part) || !unit ? part : `${part} ${unit}`, ['length'], extentWords)?.value ?? 0,
  );
  if (!faults.extent && extents.length !== dims)
    faults.extent = `${extents.length === 0 ? 'Nothing is given' : `${extents.length} given, and the scheme has ${dims}`}. Accepted: ${extentWords}.`;

  const travels = isTravelling(equation);
  const waveWords = travels ? 'a frequency such as 100 Hz, or a wavelength such as 15 m' : 'a wavelength such as 0.5 m';
  const wave = quantity('wave', texts.wave, travels ? ['length', 'frequency'] : ['length'], waveWords);
  const wavelength = wave === null || !slowest ? null : wave.kind === 'frequency' ? slowest / wave.value : wave.value;
  const timeWords = travels
    ? 'a time such as 4 s, a way such as 6 km, or a count such as 400 waves'
    : 'a time such as 2 h';
  const time = quantity('time', texts.time, travels ? ['time', 'length', 'waves'] : ['time'], timeWords);
  const seconds = timeOf(time, fastest, wave?.kind === 'frequency' && fastest ? fastest / wave.value : wavelength);

  const errorWords = travels ? 'a phase drift such as 30°, or an error such as 5 %' : 'an error such as 1 %';
  const error = quantity('error', texts.error, travels ? ['angle', 'part'] : ['part'], errorWords);
  const tolerance = toleranceOf(error?.kind, error?.value ?? 1, error?.hasUnit ?? true);
  if (error && tolerance.kind === 'angle' && tolerance.value > 180)
    faults.error ??= `${texts.error} is more than half a turn: nothing could be told apart. Accepted: ${errorWords}.`;
  if (error && tolerance.kind === 'part' && tolerance.value > 1)
    faults.error ??= `${texts.error} is all of the wave. Accepted: ${errorWords}.`;

  const nodeWords = 'bandwidth and memory of one node, such as 180 GB/s, 96 GB';
  const [first = '', second = ''] = split(texts.node, /[,;](?=\s|$)/);
  const bandwidth = quantity('node', first, ['bandwidth'], nodeWords);
  const memory = second === '' ? null : quantity('node', second, ['memory'], nodeWords);
  if (second === '') faults.node ??= `One of the two is missing. Accepted: ${nodeWords}.`;
  if (bandwidth && bandwidth.value < 1e6)
    faults.node ??= `${first.trim()} a second is slower than any machine; is GB/s meant? Accepted: ${nodeWords}.`;
  if (memory && memory.value < 1e4)
    faults.node ??= `${second.trim()} holds no grid; is GB meant? Accepted: ${nodeWords}.`;
  const count = readNumber(texts.nodes);
  if (!count || !Number.isInteger(count.value) || count.value < 1 || count.value > 1e6)
    faults.nodes = 'Accepted: a whole number of nodes between 1 and 1 000 000.';

  const spacing =
    texts.spacing.trim() === ''
      ? null
      : quantity('spacing', texts.spacing, ['length'], 'a spacing such as 0.2 m, or nothing');
  if (spacing && wavelength && spacing.value > wavelength / 2)
    faults.spacing ??= `${texts.spacing.trim()} holds fewer than two points of the shortest wave. Accepted: at most ${Number((wavelength / 2).toPrecision(3))} m.`;
  if (spacing && extents.length === dims && extents.some((extent) => spacing.value > extent / 2))
    faults.spacing ??= `${texts.spacing.trim()} is more than half of the grid's own side.`;
  const smallest = readNumber(texts.smallest);
  if (!smallest || smallest.unit !== '' || smallest.value <= 0 || smallest.value > 1 || smallest.value < 1e-6)
    faults.smallest =
      'Accepted: the smallest spacing as a part of the largest, above 0 and up to 1; 1 for equal cells.';
  const number = texts.number.trim() === '' ? null : readNumber(texts.number);
  if (texts.number.trim() !== '' && (!number || number.unit !== '' || number.value <= 0 || number.value > 1e6))
    faults.number = 'Accepted: a number above 0 and up to the bound, or nothing for nine tenths of it.';
  const diffusivity =
    texts.diffusivity.trim() === ''
      ? null
      : quantity('diffusivity', texts.diffusivity, ['diffusivity'], 'a diffusivity such as 0.1 m²/s, or nothing');

  const isWhole =
    Object.keys(faults).length === 0 && fastest && wavelength && seconds && bandwidth && memory && count && smallest;
  return {
    texts,
    faults,
    run: isWhole
      ? {
          extents,
          speeds: [fastest, ...speeds.slice(1)],
          wavelength,
          time: seconds,
          smallest: smallest.value,
          bandwidth: bandwidth.value,
          memory: memory.value,
          nodes: count.value,
        }
      : null,
    tolerance,
    parameter: number?.value ?? null,
    spacing: spacing?.value ?? null,
    diffusivity: decays(equation) ? null : (diffusivity?.value ?? null),
  };
}

function toleranceOf(kind: QuantityKind | undefined, value: number, hasUnit: boolean): Tolerance {
  if (kind === 'part') return { kind, value: hasUnit ? value : value / 100 };
  return { kind: 'angle', value };
}

function timeOf(
  time: { kind: QuantityKind; value: number } | null,
  fastest: number | undefined,
  wavelength: number | null,
): number | null {
  if (!time || !fastest) return null;
  if (time.kind === 'length') return time.value / fastest;
  return time.kind === 'waves' ? wavelength && (time.value * wavelength) / fastest : time.value;
}
