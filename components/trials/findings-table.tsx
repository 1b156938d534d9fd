import { Verdict } from '@/components/marks/verdict';
import type { FindingView } from '@/lib/trials/trial';
import { Figures } from './figures';
import { findingRows } from './finding-rows';

/** A longer one is set as text, not as a figure. */
const LONG_FIGURE = 14;

/** What a trial found, what was required, how it was measured. */
export const FindingsTable = ({ findings }: { findings: readonly FindingView[] }) => (
  <table className="trial">
    <thead>
      <tr>
        <th scope="col">Trial</th>
        <th scope="col">Found</th>
        <th scope="col">Required</th>
        <th scope="col">How</th>
        <th scope="col">Verdict</th>
      </tr>
    </thead>
    <tbody>
      {findingRows(findings).map((row) => (
        <tr key={row.name}>
          <th scope="row" className="rowhead">
            {row.title}
          </th>
          <td className="num found">
            {row.found.map(({ text, languages }) => (
              <span key={text} className={text.length > LONG_FIGURE ? 'long' : undefined}>
                <Figures text={text} />
                {languages.length > 0 && <small> {languages.join(', ')}</small>}
              </span>
            ))}
          </td>
          <td className="q due">
            <Figures text={row.targets.join('; ')} />
          </td>
          <td className="q small">
            {row.how.map(({ text, languages }) => (
              <p key={text}>
                {languages.length > 0 && <b>{languages.join(', ')}: </b>}
                <Figures text={text} />
              </p>
            ))}
          </td>
          <td>
            <Verdict outcome={row.outcome} />
            {row.where.length > 0 && <small className="where"> in {row.where.join(' and ')}</small>}
          </td>
        </tr>
      ))}
    </tbody>
  </table>
);
