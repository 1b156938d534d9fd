import { describe, expect, it } from 'vitest';
import { readQuantity } from '@/lib/budgets/quantity';
import { readRunQuestion, type RunField } from '@/lib/budgets/run-question';

const ask = (texts: Partial<Record<RunField, string>>, equation: 'wave-2d' | 'diffusion' = 'wave-2d') =>
  readRunQuestion((name) => texts[name as RunField], { equation });

describe('a run in the user’s own units', () => {
  it('reads lengths, several speeds, a tone, a way to travel, an angle and a node', () => {
    const { run, tolerance, faults } = ask({
      extent: '6 km × 1200 m',
      speed: '300 m/s, 1.5 km/s',
      wave: '100 Hz',
      time: '6 km',
      error: '30°',
      node: '180 GB/s, 96 GB',
    });
    expect(faults).toEqual({});
    expect(run).toMatchObject({
      extents: [6000, 1200],
      speeds: [1500, 300],
      wavelength: 3,
      time: 4,
      bandwidth: 1.8e11,
      memory: 9.6e10,
    });
    expect(tolerance).toEqual({ kind: 'angle', value: 30 });
  });

  it('reads the same from a wavelength, and a count of waves', () => {
    expect(ask({ speed: '1500 m/s', wave: '15 m', time: '400 waves' }).run).toMatchObject({ wavelength: 15, time: 4 });
  });

  it('takes one unit for both lengths', () => {
    expect(ask({ extent: '6 x 1.2 km' }).run?.extents).toEqual([6000, 1200]);
  });
});

describe('bad input is answered in its place', () => {
  it.each<[RunField, string, RegExp]>([
    ['speed', '0', /Zero leaves nothing/],
    ['speed', '-3 m/s', /negative/],
    ['speed', '', /Nothing is given/],
    ['speed', 'fast', /no number/],
    ['speed', '1500 m', /is a length/],
    ['speed', '1500 km/ms', /not a unit/],
    ['speed', '1e6 km/s', /faster than light/],
    ['wave', '3 s', /is a time/],
    ['extent', '6000 m', /1 given, and the scheme has 2/],
    ['extent', '6000 Hz × 2 m', /is a frequency/],
    ['time', '1e20 s', /units mixed up/],
    ['error', '400°', /half a turn/],
    ['error', '500 %', /all of the wave/],
    ['node', '180, 96', /GB\/s meant/],
    ['node', '180 GB/s, 96', /GB meant/],
    ['node', '180 GB/s', /missing/],
    ['nodes', '2.5', /whole number/],
    ['number', '-1', /above 0/],
    ['spacing', '10 m', /fewer than two points/],
    ['smallest', '3', /up to 1/],
    ['diffusivity', '3 m/s', /is a speed/],
  ])('%s “%s”', (field, text, sentence) => {
    const { faults, run, texts } = ask({ [field]: text });
    expect(faults[field]).toMatch(sentence);
    expect(run).toBeNull();
    expect(texts[field]).toBe(text);
  });

  it('tells a speed where a diffusivity is due', () => {
    expect(ask({ speed: '1500 m/s' }, 'diffusion').faults.speed).toMatch(/is a speed.*m²\/s/);
  });

  it('reads prefixes, powers and decimal commas', () => {
    expect(readQuantity('1,5 km', ['length'], '')).toMatchObject({ value: 1500 });
    expect(readQuantity('6.4·10^-3 m', ['length'], '')).toMatchObject({ value: 0.0064 });
    expect(readQuantity('12 000 m', ['length'], '')).toMatchObject({ value: 12000 });
    expect(readQuantity('1 cm²/s', ['diffusivity'], '')).toMatchObject({ value: 1e-4 });
  });
});
