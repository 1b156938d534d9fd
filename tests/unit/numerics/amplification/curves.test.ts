import { describe, expect, it } from 'vitest';
import { amplificationFactors } from '@/lib/numerics/amplification';
import { schemeCurves } from '@/lib/numerics/curves';
import { compileScheme } from '@/lib/numerics/numeric-scheme';
import { parseAngle, sampleRoots } from '@/lib/numerics/samples';
import { stabilityMap, stabilityPlane } from '@/lib/numerics/stability-map';
import { central, CRANK_NICOLSON, EULER, LEAPFROG, lines, RK2, RK4, stencil, table } from './definitions';

const thetas = (count: number) => Array.from({ length: count }, (_, k) => (k * Math.PI) / (count - 1));

describe('the principal root', () => {
  it('of leapfrog is followed through the crossing at theta = pi/2 when lambda is 1, where it is the exact shift', () => {
    const curve = schemeCurves(compileScheme(lines('advection', [central], LEAPFROG)), [1], [1], thetas(49));
    for (const point of curve.slice(1, -1)) {
      expect(point.phaseSpeed).toBeCloseTo(1, 6);
      expect(point.modulus).toBeCloseTo(1, 7);
    }
  });

  it('has an argument that is unwrapped beyond pi', () => {
    // Lambda theta reaches 4 pi for the exact shift by four cells.
    const shift = table('advection', [
      [1, 0, '1'],
      [0, -4, '-1'],
    ]);
    const [last] = schemeCurves(compileScheme({ ...shift, parameters: ['lambda'] }), [4], [1], [Math.PI]);
    expect(last!.phaseSpeed).toBeCloseTo(1, 12);
  });

  it('of DuFort-Frankel is told to have collided with the computational root', () => {
    const scheme = table('diffusion', [
      [1, 0, '1+2*r'],
      [0, 1, '-2*r'],
      [0, -1, '-2*r'],
      [-1, 0, '2*r-1'],
    ]);
    const [sample] = sampleRoots(scheme, [{ parameters: { r: '2' }, theta: ['1/2*pi'] }]);
    expect(sample!.principalRoot).toBeNull();
    expect(sample!.maxModulus).toBeCloseTo(Math.sqrt(3 / 5), 12);
  });

  it('carries group speed: leapfrog loses it at theta = pi/2 and reverses it beyond', () => {
    const curve = schemeCurves(
      compileScheme(lines('advection', [central], LEAPFROG)),
      [0.5],
      [1],
      [0.01, Math.PI / 2, 3],
    );
    expect(curve[0]!.groupSpeed).toBeCloseTo(1, 3);
    expect(curve[1]!.groupSpeed).toBeCloseTo(0, 12);
    // cos(theta)/sqrt(1 − lambda² sin² theta), the textbook group speed.
    expect(curve[2]!.groupSpeed).toBeCloseTo(Math.cos(3) / Math.sqrt(1 - 0.25 * Math.sin(3) ** 2), 10);
  });

  it('leaves the computational roots apart', () => {
    const [point] = schemeCurves(compileScheme(lines('advection', [central], LEAPFROG)), [0.5], [1], [1]);
    expect(point!.computational).toHaveLength(1);
    expect(point!.computational[0]).toBeCloseTo(1, 12);
  });
});

describe('laws of amplification', () => {
  it.each([
    ['leapfrog', lines('advection', [central], LEAPFROG), [0.8]],
    ['Crank-Nicolson', lines('advection', [central], CRANK_NICOLSON), [7.3]],
    ['Crank-Nicolson, Schrodinger', lines('schrodinger', [stencil(2, -1, 0, 1)], CRANK_NICOLSON), [3.1]],
    [
      'wave leapfrog',
      table('wave', [
        [1, 0, '1'],
        [0, 0, '-2+2*lambda^2'],
        [0, 1, '-lambda^2'],
        [0, -1, '-lambda^2'],
        [-1, 0, '1'],
      ]),
      [0.9],
    ],
  ])('%s keeps the modulus of every root of every wave', (_, scheme, parameters) => {
    const numeric = compileScheme(scheme);
    for (const theta of thetas(65).slice(1)) {
      const { re, im } = amplificationFactors(numeric, parameters, [theta]);
      re.forEach((x, k) => expect(Math.abs(Math.hypot(x, im[k]!) - 1)).toBeLessThan(1e-12));
    }
  });

  it('mirroring space and the sign of the speed changes no modulus', () => {
    const left = compileScheme(lines('advection', [stencil(1, -2, -1, 0, 1)], RK4));
    const right = compileScheme(lines('advection', [stencil(1, -1, 0, 1, 2)], RK4));
    for (const theta of thetas(17)) {
      const a = amplificationFactors(left, [0.7], [theta]);
      const b = amplificationFactors(right, [-0.7], [theta]);
      expect(Math.hypot(a.re[0]!, a.im[0]!)).toBeCloseTo(Math.hypot(b.re[0]!, b.im[0]!), 13);
    }
  });
});

describe('maps', () => {
  it.each([
    ['two levels', lines('advection', [stencil(1, -2, -1, 0, 1)], RK2)],
    ['three levels', lines('advection', [central], LEAPFROG)],
    ['complex coefficients', lines('schrodinger', [stencil(2, -1, 0, 1)], EULER)],
    [
      'four levels',
      lines('advection', [central], {
        kind: 'multistep',
        alpha: ['0', '0', '-1', '1'],
        beta: ['5/12', '-4/3', '23/12', '0'],
      }),
    ],
  ])('of %s hold what single evaluations give', (_, scheme) => {
    const numeric = compileScheme(scheme);
    const map = stabilityMap(numeric, Float64Array.of(0.2, 0.45, 1.7), 33);
    map.values.forEach((value, v) =>
      map.thetas.forEach((theta, w) => {
        const { re, im } = amplificationFactors(numeric, [value], [theta]);
        const worst = Math.max(...Array.from(re, (x, k) => Math.hypot(x, im[k]!)));
        expect(Math.abs(map.modulus[v * 33 + w]! - worst)).toBeLessThan(1e-7);
      }),
    );
  });

  it('of two numbers show the region of forward Euler with central differences', () => {
    const numeric = compileScheme(lines('advection-diffusion', [central, stencil(2, -1, 0, 1)], EULER));
    const plane = stabilityPlane(numeric, Float64Array.of(0.5, 0.9), Float64Array.of(0.3, 0.6));
    // lambda² <= 2 r <= 1
    expect(Array.from(plane, (m) => m <= 1 + 1e-12)).toEqual([true, false, false, false]);
  });
});

describe('angles', () => {
  it.each([
    ['1/4*pi', Math.PI / 4],
    ['pi', Math.PI],
    ['-2/3*pi', (-2 * Math.PI) / 3],
    ['0.75', 0.75],
    ['0', 0],
    ['pi/3', Math.PI / 3],
  ])('%s is read as radians', (text, value) => expect(parseAngle(text)).toBeCloseTo(value, 15));

  it('says what it accepts', () =>
    expect(() => parseAngle('quarter')).toThrow(/accepted: a number or a multiple of pi/));
});
