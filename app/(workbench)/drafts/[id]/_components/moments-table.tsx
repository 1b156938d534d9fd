import type { LiveMoment } from '@/lib/facts/live-analysis';
import { decimalText } from '@/lib/facts/reading-texts';

const RAISED = ['', '', '²', '³', '⁴', '⁵', '⁶', '⁷', '⁸', '⁹', '¹⁰'];

const valueAt = ({ terms }: LiveMoment, parameters: readonly number[]) =>
  terms.reduce(
    (sum, { powers, factor }) => sum + factor * powers.reduce((all, p, k) => all * (parameters[k] ?? 0) ** p, 1),
    0,
  );

/** What the draft makes of 1, x, x² … as solutions of its equation, and what is left over. */
export const MomentsTable = ({
  moments,
  parameters,
}: {
  moments: readonly LiveMoment[];
  parameters: readonly number[];
}) => (
  <div className="scrolls" role="region" aria-label="Moments" tabIndex={0}>
    <table className="moments">
      <caption className="sr">Moments of the scheme</caption>
      <thead>
        <tr>
          <th scope="col">Moment</th>
          <th scope="col">Found</th>
          <th scope="col">Needed</th>
          <th scope="col">Left over</th>
        </tr>
      </thead>
      <tbody>
        {moments.map((moment) => (
          <tr key={moment.power}>
            <th scope="row" className="m">
              {moment.power === 0 ? '1' : `x${RAISED[moment.power]}`}
            </th>
            <td className="m">{moment.found}</td>
            <td className="m">{moment.needed}</td>
            <td>
              {moment.holds ? (
                <span className="holds">holds</span>
              ) : (
                <>
                  <span className="m">{moment.left}</span>
                  {parameters.length > 0 && <> = {decimalText(valueAt(moment, parameters), 2)}</>}
                </>
              )}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  </div>
);
