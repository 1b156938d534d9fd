import { Verdict } from '@/components/marks/verdict';
import { Figures } from '@/components/trials/figures';
import { FINDING_TITLES, LANGUAGE_NAMES } from '@/components/trials/finding-rows';
import type { FindingChange, FindingSide } from '@/lib/reviews/difference/finding-difference';
import { Fix } from './fix';

const measured = (side: FindingSide | null) => (side ? <Figures text={side.measured} /> : null);
const verdict = (side: FindingSide | null) => (side ? <Verdict outcome={side.outcome} /> : null);

/** The findings that came out otherwise than in the trial of the revision before. */
export const FindingCorrections = ({ changes, from }: { changes: readonly FindingChange[]; from: number }) => (
  <table className="trial corrs findings">
    <caption className="lab">Found otherwise than for revision {from}</caption>
    <thead>
      <tr>
        <th scope="col">Trial</th>
        <th scope="col">Language</th>
        <th scope="col">Found</th>
        <th scope="col">Verdict</th>
      </tr>
    </thead>
    <tbody>
      {changes.map(({ name, language, was, now }) => (
        <tr key={`${name}:${language ?? ''}`}>
          <th scope="row" className="rowhead">
            {FINDING_TITLES[name]}
          </th>
          <td className="q">{language ? LANGUAGE_NAMES[language] : 'all'}</td>
          <td>{was?.measured === now?.measured ? measured(now) : <Fix was={measured(was)} now={measured(now)} />}</td>
          <td>{was?.outcome === now?.outcome ? verdict(now) : <Fix was={verdict(was)} now={verdict(now)} />}</td>
        </tr>
      ))}
    </tbody>
  </table>
);
