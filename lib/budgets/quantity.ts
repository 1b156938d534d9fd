/** Quantities with units as people type them, in SI base units; what is mixed up is told by unit and by magnitude. */
import { readNumber } from '@/lib/shortlist/number-text';

/** Unit to its size in the SI base unit of the kind. */
const UNITS = {
  length: { m: 1, km: 1e3, cm: 1e-2, mm: 1e-3, µm: 1e-6, um: 1e-6, nm: 1e-9 },
  time: {
    s: 1,
    ms: 1e-3,
    µs: 1e-6,
    us: 1e-6,
    ns: 1e-9,
    min: 60,
    h: 3600,
    d: 86400,
    day: 86400,
    days: 86400,
    year: 31557600,
    years: 31557600,
  },
  speed: { 'm/s': 1, 'km/s': 1e3, 'cm/s': 1e-2, 'mm/s': 1e-3, 'km/h': 1 / 3.6, kn: 1852 / 3600 },
  diffusivity: { 'm2/s': 1, 'cm2/s': 1e-4, 'mm2/s': 1e-6 },
  dispersivity: { 'm3/s': 1 },
  hyperdiffusivity: { 'm4/s': 1 },
  frequency: { Hz: 1, kHz: 1e3, MHz: 1e6, GHz: 1e9, mHz: 1e-3 },
  bandwidth: { 'B/s': 1, 'kB/s': 1e3, 'MB/s': 1e6, 'GB/s': 1e9, 'TB/s': 1e12, 'PB/s': 1e15 },
  memory: {
    B: 1,
    kB: 1e3,
    MB: 1e6,
    GB: 1e9,
    TB: 1e12,
    PB: 1e15,
    kiB: 1024,
    MiB: 1024 ** 2,
    GiB: 1024 ** 3,
    TiB: 1024 ** 4,
  },
  waves: { waves: 1, wave: 1, wavelengths: 1, wavelength: 1, periods: 1 },
  angle: { '°': 1, deg: 1, degrees: 1, rad: 180 / Math.PI },
  part: { '%': 0.01 },
} as const satisfies Record<string, Readonly<Record<string, number>>>;
export type QuantityKind = keyof typeof UNITS;

export const KIND_WORDS: Readonly<Record<QuantityKind, string>> = {
  length: 'a length',
  time: 'a time',
  speed: 'a speed',
  diffusivity: 'a diffusivity',
  dispersivity: 'a coefficient of the third derivative',
  hyperdiffusivity: 'a coefficient of the fourth derivative',
  frequency: 'a frequency',
  bandwidth: 'a bandwidth',
  memory: 'a memory',
  waves: 'a number of wavelengths',
  angle: 'an angle',
  part: 'a part of the wave',
};

export interface Quantity {
  readonly kind: QuantityKind;
  /** SI base unit; degrees for angles, a part of one for parts. */
  readonly value: number;
  readonly hasUnit: boolean;
}

const plainUnit = (unit: string) =>
  unit
    .replace(/²/g, '2')
    .replace(/³/g, '3')
    .replace(/⁴/g, '4')
    .replace(/\^/g, '')
    .replace(/μ/g, 'µ')
    .replace(/\s+/g, '');

function sizeOf(kind: QuantityKind, unit: string): number | undefined {
  const units: Readonly<Record<string, number>> = UNITS[kind];
  return Object.hasOwn(units, unit) ? units[unit] : undefined;
}

/**
 * @param kinds    what may be given; a bare number is taken in the base unit of the first
 * @param accepted what is accepted, for the sentence: "a length such as 6 km"
 * @returns the quantity, or a sentence that says what is wrong and what is accepted
 */
export function readQuantity(text: string, kinds: readonly QuantityKind[], accepted: string): Quantity | string {
  if (text.trim() === '') return `Nothing is given. Accepted: ${accepted}.`;
  const number = readNumber(text);
  if (!number) return `“${text.trim()}” has no number. Accepted: ${accepted}.`;
  const unit = plainUnit(number.unit);
  if (number.value < 0) return `${text.trim()} is negative. Accepted: ${accepted}.`;
  if (number.value === 0) return `Zero leaves nothing to compute. Accepted: ${accepted}.`;
  const [first] = kinds;
  if (unit === '') return first ? { kind: first, value: number.value, hasUnit: false } : `Accepted: ${accepted}.`;
  for (const kind of kinds) {
    const size = sizeOf(kind, unit);
    if (size !== undefined) return { kind, value: number.value * size, hasUnit: true };
  }
  const meant = (Object.keys(UNITS) as QuantityKind[]).find((kind) => sizeOf(kind, unit) !== undefined);
  return meant
    ? `${text.trim()} is ${KIND_WORDS[meant]}. Accepted: ${accepted}.`
    : `“${number.unit}” is not a unit known here. Accepted: ${accepted}.`;
}
