import { describe, expect, it } from 'vitest';
import { agrees, inPrintedUnits, printedValue } from '@/lib/numerics/stability/printed-value';

const UNIT = 10n ** 40n;

describe('the value of a printed closed form', () => {
  it.each([
    // The decimals of the OEIS (A002193, A002194, A001622, A002580), from memory; the last by Python's decimal module.
    ['sqrt(2)', '1.414213562373095048801688724209698078569'],
    ['-sqrt(3)/2', '-0.866025403784438646763723170752936183471'],
    ['(1 + sqrt(5))/2', '1.618033988749894848204586834365638117720'],
    ['2^(1/3)', '1.259921049894873164767210607278228350570'],
    ['sqrt((32*sqrt(6) - 12)/125)', '0.728745068012465929401219167996394601917'],
  ])('%s is %s', (text, decimal) => {
    const [whole = '', fraction = ''] = decimal.replace('-', '').split('.');
    const size = BigInt(whole + fraction.padEnd(40, '0').slice(0, 40));
    expect(agrees(printedValue(text), decimal.startsWith('-') ? -size : size)).toBe(true);
  });

  it('reads names with the values given for them', () => {
    expect(agrees(printedValue('2*sqrt(2)/(3*kappa)', { kappa: 2n * UNIT }), printedValue('sqrt(2)/3'))).toBe(true);
  });

  it('tells a form that agrees in the digits of a double only', () => {
    const near = inPrintedUnits({ num: 141_421_356_237_309_505n, den: 10n ** 17n });
    expect(agrees(printedValue('sqrt(2)'), near)).toBe(false);
  });

  it.each(['2^3', 'sqrt(', 'x', '(1', '1 2'])('refuses %s', (text) => {
    expect(() => printedValue(text)).toThrow(RangeError);
  });
});
