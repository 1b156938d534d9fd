'use client';

import { useState } from 'react';
import { Letters } from '@/components/math/letters';
import type { Cost } from '@/lib/facts/facts';
import { decimalText } from '@/lib/facts/reading-texts';

const START_GIGABYTES = 20;

const paceText = (gigabytes: number, bytes: number) =>
  `${decimalText((gigabytes * 1000) / bytes, 3)} million points a second`;

/** What the memory of a machine allows: the pace that no kernel of this scheme can pass there. */
export function Roofline({ cost }: { cost: Cost }) {
  const [text, setText] = useState(String(START_GIGABYTES));
  const gigabytes = Number(text.replace(',', '.'));
  const holds = text.trim() !== '' && Number.isFinite(gigabytes) && gigabytes > 0 && gigabytes <= 1e6;
  const intensity = cost.operations / cost.bytesDouble;
  return (
    <div className="roofline">
      <label>
        <span className="lab">Memory bandwidth of a machine, GB/s</span>
        <input
          type="text"
          inputMode="decimal"
          value={text}
          aria-invalid={!holds}
          aria-describedby="roofline-answer"
          onChange={(event) => setText(event.target.value)}
        />
      </label>
      <output id="roofline-answer" className={holds ? 'small q' : 'small red'}>
        <Letters
          text={
            holds
              ? `At most ${paceText(gigabytes, cost.bytesDouble)} in real64, ${paceText(gigabytes, cost.bytesSingle)} in real32: ${decimalText(gigabytes * intensity, 3)} Gflop/s at ${decimalText(intensity, 2)} flops a byte.`
              : 'Accepted: a number of gigabytes a second above 0 and up to 1,000,000.'
          }
        />
      </output>
    </div>
  );
}
