import type { Route } from 'next';
import Link from 'next/link';
import { SmallSketch } from '@/components/marks/small-sketch';
import type { BookCandidate } from '@/lib/shortlist/answer-shortlist';
import type { Requirement } from '@/lib/shortlist/requirement';
import { type Placed, pointsText, type Shortlist } from '@/lib/shortlist/shortlist';
import { conditionColumns, type ConditionColumn } from './condition-columns';

export const MEASURE_HEADS: Readonly<Record<Requirement['rank'], string>> = {
  bytes: 'Bytes moved',
  memory: 'Memory',
  steps: 'Steps',
};

/** "× 1.0", "× 13 241" */
export function timesText(relative: number): string {
  if (relative >= 1e6) return `× ${relative.toExponential(1).replace('e+', ' × 10^')}`;
  return `× ${relative < 100 ? relative.toFixed(relative < 0.1 ? 2 : 1) : Math.round(relative).toLocaleString('en').replace(/,/g, '\u202f')}`;
}

function Cells({ placed, columns }: { placed: Placed; columns: readonly ConditionColumn[] }) {
  return columns.map(({ condition, head, value }) => {
    const fails = placed.fails.includes(condition);
    return (
      <td key={condition} data-h={head.toLowerCase()} className={fails ? 'c cellbad' : 'c'}>
        <span className={fails ? 'fail' : undefined}>{value(placed)}</span>
        {fails && <span className="sr-only">, not as asked</span>}
      </td>
    );
  });
}

/** Fits first, ranked; then what does not fit, with the conditions that fail marked. */
export function AnswerTable({ list, asked }: { list: Shortlist; asked: Requirement }) {
  const columns = conditionColumns(asked);
  const most = Math.max(1, ...list.fits.map(({ relative }) => relative ?? 1));
  return (
    <table className="fit">
      <thead>
        <tr>
          <th scope="col">
            <span className="sr-only">Rank</span>
          </th>
          <th scope="col">Sketch</th>
          <th scope="col">Fits</th>
          {columns.map(({ condition, head, asked: wanted }) => (
            <th key={condition} scope="col" className="c">
              {head}
              <b>{wanted}</b>
            </th>
          ))}
          <th scope="col" className="r">
            Points
            <br />a wave
          </th>
          <th scope="col">
            {MEASURE_HEADS[asked.rank]},<br />
            best = 1
          </th>
        </tr>
      </thead>
      <tbody>
        {list.fits.map((placed, k) => (
          <tr key={placed.candidate.slug} className={k === 0 ? 'first' : undefined}>
            <td className="rank">{k + 1}</td>
            <td className="sk">
              <SmallSketch sketch={(placed.candidate as BookCandidate).summary.sketch} />
            </td>
            <td className="nmc">
              <small>{placed.candidate.callNumber}</small>
              <Link href={`/sheets/${placed.candidate.slug}` as Route}>{placed.candidate.title}</Link>
              <p>{placed.reason}</p>
              {placed.cost && (
                <p className="no-print">
                  <Link
                    href={
                      `/budget?scheme=${placed.candidate.slug}&number=${Number(placed.cost.parameter.toPrecision(4))}` as Route
                    }
                  >
                    Budget a run
                  </Link>
                </p>
              )}
            </td>
            <Cells placed={placed} columns={columns} />
            <td data-h="points a wave" className="r num big">
              {placed.cost && pointsText(placed.cost.pointsPerWave)}
            </td>
            <td data-h={MEASURE_HEADS[asked.rank].toLowerCase()} className="wk">
              <span className="wbar" style={{ width: `${(100 * (placed.relative ?? 1)) / most}%` }} />
              <span className="num">{placed.relative !== null && timesText(placed.relative)}</span>
            </td>
          </tr>
        ))}
      </tbody>
      {list.misses.length > 0 && (
        <tbody className="no_">
          <tr className="gap">
            <td colSpan={columns.length + 5} />
          </tr>
          <tr className="mid">
            <th scope="rowgroup" colSpan={columns.length + 5}>
              Does not fit, and why
            </th>
          </tr>
          {list.misses.map((placed) => (
            <tr key={placed.candidate.slug}>
              <td className="rank" />
              <td className="nmc" colSpan={2}>
                <small>{placed.candidate.callNumber}</small>
                <Link href={`/sheets/${placed.candidate.slug}` as Route}>{placed.candidate.title}</Link>
                <p>{placed.reason}</p>
              </td>
              <Cells placed={placed} columns={columns} />
              <td
                data-h="points a wave"
                className={placed.fails.includes('accuracy') ? 'r num big q cellbad' : 'r num big q'}
              >
                {placed.cost ? pointsText(placed.cost.pointsPerWave) : '–'}
              </td>
              <td
                data-h={MEASURE_HEADS[asked.rank].toLowerCase()}
                className={placed.fails.includes('stable') ? 'wk q cellbad' : 'wk q'}
              >
                {placed.relative !== null ? (
                  timesText(placed.relative)
                ) : (
                  <span className={placed.fails.includes('stable') ? 'fail' : undefined}>never</span>
                )}
              </td>
            </tr>
          ))}
        </tbody>
      )}
    </table>
  );
}
