import type { Route } from 'next';
import Link from 'next/link';
import type { OtherWay } from '@/lib/budgets/answer-budget';
import type { RunCosting } from '@/lib/budgets/run';
import { bytesText, countText, durationText, lengthText } from '@/lib/budgets/units';
import { decimalText } from '@/lib/facts/reading-texts';

interface WaysProps {
  name: string;
  asked: RunCosting;
  others: readonly OtherWay[];
  /** The address of the same run with another scheme and number. */
  addressOf: (slug: string, parameter: number) => string;
}

/** The same error by other schemes and steps, each at the step that is quickest for it. */
export function WaysTable({ name, asked, others, addressOf }: WaysProps) {
  return (
    <div className="xs" tabIndex={0} role="group" aria-label="Same error, other ways">
      <table className="alts">
        <thead>
          <tr>
            <th scope="col">Scheme</th>
            <th scope="col" className="r">
              Points a wave
            </th>
            <th scope="col" className="r">
              Δx
            </th>
            <th scope="col" className="r">
              Steps
            </th>
            <th scope="col" className="r">
              Memory
            </th>
            <th scope="col" className="r">
              Time
            </th>
          </tr>
        </thead>
        <tbody>
          <Line costing={asked}>
            <b>{name}</b>
          </Line>
          {others.map(({ row, costing }) => (
            <Line key={row.slug} costing={costing}>
              <Link href={addressOf(row.slug, costing.parameter) as Route}>
                {row.callNumber} {row.title}, {decimalText(costing.parameter, 3)}
              </Link>
            </Line>
          ))}
        </tbody>
      </table>
    </div>
  );
}

const Line = ({ costing, children }: { costing: RunCosting; children: React.ReactNode }) => (
  <tr>
    <td>{children}</td>
    <td className="r">{costing.pointsPerWave.toFixed(1)}</td>
    <td className="r">{lengthText(costing.spacing)}</td>
    <td className="r">{countText(costing.steps)}</td>
    <td className="r">{bytesText(costing.memory)}</td>
    <td className="r num">{durationText(costing.seconds)}</td>
  </tr>
);
