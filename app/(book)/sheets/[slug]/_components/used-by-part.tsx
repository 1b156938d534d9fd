import type { SheetView } from '@/lib/entries/entry';
import { Part } from './part';

const NUMBERS = ['none', 'one', 'two', 'three', 'four', 'five'];

/** How far a code's revision lies behind the one shown. */
function Behind({ used, shown }: { used: number; shown: number }) {
  const behind = shown - used;
  if (behind <= 0) return <>revision {used}</>;
  return (
    <span className="red">
      revision {used}, {NUMBERS[behind] ?? behind} behind
    </span>
  );
}

export const UsedByPart = ({ sheet, figure }: { sheet: SheetView; figure: number }) => (
  <Part id="used" figure={figure} name="Used by">
    {sheet.usedBy.length === 0 ? (
      <p className="cap">No code has booked a kernel of this entry.</p>
    ) : (
      <table>
        <thead className="sr">
          <tr>
            <th scope="col">Code</th>
            <th scope="col">Purpose</th>
            <th scope="col">Revision</th>
          </tr>
        </thead>
        <tbody>
          {sheet.usedBy.map(({ code, purpose, revision }) => (
            <tr key={`${code}:${revision}`}>
              <th scope="row" className="rowhead">
                {code}
              </th>
              <td className="q">{purpose}</td>
              <td>
                <Behind used={revision} shown={sheet.revision} />
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    )}
  </Part>
);
