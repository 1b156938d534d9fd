/** Bounds along lines through the region of several numbers, in words. */
import { methodText } from './bound-texts';
import type { StabilityFacts } from './facts';
import { limitText, signed, symbolText } from './reading-texts';

export interface RegionLine {
  /** "λₓ alone", "r = 1/4". */
  readonly along: string;
  /** "|λₓ| ≤ 1", "no value but 0". */
  readonly stable: string;
  readonly obtained: string;
}

type End = string | null;

/** "0 ≤ r ≤ 1/2"; ends are closed forms or decimals. */
function intervalText([lo, hi]: readonly [End, End], symbol: string): string {
  if (lo === null && hi === null) return `every ${symbol}`;
  if (lo === '0' && hi === '0') return 'no value but 0';
  if (lo === null) return `${symbol} ≤ ${endText(hi!)}`;
  if (hi === null) return lo === '0' ? `every ${symbol} ≥ 0` : `${symbol} ≥ ${endText(lo)}`;
  if (lo === `-${hi}` || lo === `-(${hi})`) return `|${symbol}| ≤ ${endText(hi)}`;
  return `${endText(lo)} ≤ ${symbol} ≤ ${endText(hi)}`;
}

function endText(end: string): string {
  const value = Number(end);
  return Number.isNaN(value) ? signed(end.replace(/sqrt\((\d+)\)/g, '√$1').replace(/\*/g, '')) : limitText(value, end);
}

function equalLines({ parameter, intervals, singleDirection }: StabilityFacts): RegionLine[] {
  if (singleDirection.length === 0 || parameter === null) return [];
  const symbol = symbolText(parameter);
  const all = singleDirection.map((each) => symbolText(each.parameter)).join(' = ');
  return [
    {
      along: `${all} = ${symbol}`,
      stable:
        intervals.length === 0
          ? 'no value but 0'
          : intervals.map((i) => intervalText([i.loExact ?? i.lo, i.hiExact ?? i.hi], symbol)).join(' or '),
      obtained: [...new Set(intervals.map((i) => methodText(i.method, i.tolerance)))].join(', ') || 'numeric',
    },
  ];
}

const singleLines = ({ singleDirection }: StabilityFacts): RegionLine[] =>
  singleDirection.map(({ parameter, lo, hi, method }) => ({
    along: `${symbolText(parameter)} alone`,
    stable: intervalText([lo, hi], symbolText(parameter)),
    obtained: method ? methodText(method) : '',
  }));

const cutLines = ({ cuts }: StabilityFacts): RegionLine[] =>
  cuts.map(({ fixed, intervals, method }) => ({
    along: Object.entries(fixed)
      .map(([name, value]) => `${symbolText(name)} = ${signed(value)}`)
      .join(', '),
    stable: intervals.length === 0 ? 'no value' : intervals.map((each) => intervalText(each, 'λ')).join(' or '),
    obtained: method ? methodText(method) : '',
  }));

/** @returns nothing for schemes of one number */
export const regionTexts = (stability: StabilityFacts): RegionLine[] => [
  ...equalLines(stability),
  ...singleLines(stability),
  ...cutLines(stability),
];
