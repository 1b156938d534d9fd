'use client';

import { useMemo, useState } from 'react';
import { Letters } from '@/components/math/letters';
import { decimalText } from '@/lib/facts/reading-texts';
import type { NumericScheme } from '@/lib/numerics/numeric-scheme';
import { spectralRadius } from '@/lib/numerics/wave-grid';

/** Below this the growth a step is lost in the rounding of the roots. */
const ROUNDING = 1e-13;

interface Props {
  readonly numeric: NumericScheme;
  readonly symbol: string;
  readonly start: number;
  /** max|z| − 1 ~ factor · p^q for small p, where it is known: says what rounding hides. */
  readonly law: { readonly q: number; readonly factor: number } | null;
}

function answer(value: number, growth: number, law: Props['law'], symbol: string): string {
  const small = law && growth < ROUNDING ? law.factor * Math.abs(value) ** law.q : growth;
  if (!(small > 0)) return `At ${symbol} = ${decimalText(value)} no wave grows.`;
  const steps = Math.ceil(Math.LN10 / Math.log1p(small));
  const source = small === growth ? '' : ', by the law for small values';
  return `At ${symbol} = ${decimalText(value)} the worst wave grows by ${decimalText(small, 3)} a step${source}: tenfold after ${steps.toLocaleString('en-GB')} ${steps === 1 ? 'step' : 'steps'}.`;
}

/** Growth a step and steps until tenfold at a value that the reader chooses. */
export function GrowthAt({ numeric, symbol, start, law }: Props) {
  const [text, setText] = useState(String(start));
  const value = Number(text.replace(',', '.'));
  const holds = text.trim() !== '' && Number.isFinite(value) && Math.abs(value) <= 1e3 && value !== 0;
  const growth = useMemo(
    () =>
      holds
        ? spectralRadius(
            numeric,
            numeric.parameters.map(() => value),
          ).modulus - 1
        : 0,
    [holds, numeric, value],
  );
  return (
    <div className="roofline">
      <label>
        <span className="lab">
          <Letters text={`Growth at ${symbol} =`} />
        </span>
        <input
          type="text"
          inputMode="decimal"
          value={text}
          aria-invalid={!holds}
          aria-describedby="growth-answer"
          onChange={(event) => setText(event.target.value)}
        />
      </label>
      <output id="growth-answer" className={holds ? 'small q' : 'small red'}>
        <Letters
          text={holds ? answer(value, growth, law, symbol) : 'Accepted: a number other than 0, between −1000 and 1000.'}
        />
      </output>
    </div>
  );
}
