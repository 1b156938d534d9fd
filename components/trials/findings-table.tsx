import { Verdict } from '@/components/marks/verdict';
import type { FindingView } from '@/lib/trials/trial';
import { Figures } from './figures';
import { findingRows } from './finding-rows';

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
              <span key={text}>
                <Figures text={text} />
                {languages.length > 0 && <small> {languages.join(', ')}</small>}
              </span>
            ))}
          </td>
          <td className="q due">
            <Figures text={row.targets.join('; ')} />
          </td>
          <td className="q small">
            <Figures text={row.how.join(' ')} />
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
