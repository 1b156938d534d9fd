import { describe, expect, it } from 'vitest';
import { questionQuery, readQuestion } from '@/lib/shortlist/question';

const ask = (texts: Record<string, string>) => readQuestion((name) => texts[name]);

describe('the question of the shortlist', () => {
  it('comes back whole from its own address', () => {
    const { asked } = ask({
      equation: 'wave',
      dims: '2',
      errorPercent: '1 %',
      duration: '50',
      slowest: '30 %',
      fastest: '0,9',
    });
    expect(asked).toMatchObject({
      equation: 'wave',
      dims: 2,
      errorPercent: 1,
      duration: 50,
      slowest: 0.3,
      fastest: 0.9,
    });
    const again = readQuestion((name) => new URLSearchParams(questionQuery(asked)).get(name) ?? undefined);
    expect(again.asked).toEqual(asked);
    expect(again.faults).toEqual({});
  });

  it.each([
    ['errorPercent', '0', /error of zero/],
    ['errorPercent', '-1', /negative/],
    ['errorPercent', '500', /nothing is left/],
    ['errorPercent', '', /Nothing is given/],
    ['errorPercent', '30°', /not a part of the wave/],
    ['duration', '0', /goes some way/],
    ['duration', '6000 m', /unit of its own/],
    ['duration', '1e9', /metres/],
    ['slowest', '1500', /speed in m\/s/],
    ['fastest', '80', /0.8 may be meant/],
    ['fastest', 'quick', /not a number/],
    ['dims', '7', /not a choice/],
    ['equation', 'poisson', /Accepted: advection/],
  ])('answers %s “%s” in its place', (field, text, sentence) => {
    expect(ask({ [field]: text }).faults[field as 'dims']).toMatch(sentence);
  });

  it('says so where the slowest is faster than the fastest', () => {
    expect(ask({ slowest: '0.9', fastest: '0.2' }).faults.slowest).toMatch(/faster than the fastest/);
  });

  it('hints that a part of one was perhaps meant', () => {
    expect(ask({ errorPercent: '0.05' })).toMatchObject({
      faults: {},
      hints: { errorPercent: expect.stringMatching(/5 %/) as string },
    });
  });
});
