import type { Metadata, Route } from 'next';
import Form from 'next/form';
import Link from 'next/link';
import { Vial, STATE_WORDS } from '@/components/marks/vial';
import { MathText } from '@/components/math/math-text';
import { FINDING_TITLES } from '@/components/trials/finding-rows';
import { CopyText } from '@/components/ui/copy-text';
import { Nothing } from '@/components/ui/nothing';
import { PrintButton } from '@/components/ui/print-button';
import { requireActor } from '@/lib/auth/require-actor';
import { compareEntries, listAddable } from '@/lib/comparisons/compare-entries';
import { comparedFindings, type ComparedRow, PLACES, plainText, type Value } from '@/lib/comparisons/side-by-side';
import { env } from '@/lib/env';
import { ComparedPlots } from './_components/compared-plots';
import { SharedSketch, sharedAxes, stageSketch } from './_components/shared-sketch';

export const metadata: Metadata = { title: 'Side by side' };

const addressOf = (slugs: readonly string[]) =>
  `/compare${slugs.length > 0 ? '?' : ''}${slugs.map((slug) => `entry=${encodeURIComponent(slug)}`).join('&')}`;

const Shown = ({ value }: { value: Value | null }) =>
  value === null || typeof value === 'string' ? (value ?? '–') : <MathText runs={value} />;

const RowOf = ({ row: { term, values, differs } }: { row: ComparedRow }) => (
  <tr className={differs ? 'differs' : undefined}>
    <th scope="row">
      {term}
      {differs && <span className="sr-only">, differs</span>}
    </th>
    {values.map((value, k) => (
      <td key={k} className="num sv">
        <Shown value={value} />
      </td>
    ))}
  </tr>
);

/** Up to four entries in one frame: sketches on the same axes, facts in rows, curves over one another. */
export default async function ComparePage({ searchParams }: PageProps<'/compare'>) {
  const actor = await requireActor();
  const { entry = [] } = await searchParams;
  const slugs = (Array.isArray(entry) ? entry : [entry]).filter((slug) => slug !== '');
  const { sheets, rows, curves, unknown, beyond } = await compareEntries(actor, slugs);
  const addable = sheets.length < PLACES ? await listAddable(actor, sheets) : [];
  const shown = sheets.map(({ slug }) => slug);
  const origin = env().NEXTAUTH_URL.replace(/\/$/, '');
  const sketches = new Map(
    sheets.flatMap((sheet) =>
      sheet.summary ? [[sheet.slug, stageSketch(sheet.summary.sketch, sheet.facts)] as const] : [],
    ),
  );
  const axes = sharedAxes([...sketches.values()]);
  const looks = new Map(sheets.map(({ callNumber }, k) => [callNumber, k]));
  const allRows = [...rows, ...comparedFindings(sheets, FINDING_TITLES)];
  const asText = [
    ['', ...sheets.map(({ callNumber, title }) => `${callNumber} ${title}`)],
    ...allRows.map(({ term, values }) => [term, ...values.map(plainText)]),
  ]
    .map((cells) => cells.join('\t'))
    .join('\n');

  return (
    <div className="sbs">
      <div className="title">
        <div>
          <div className="call">
            <span>
              {sheets.length} of {PLACES} places taken
            </span>
          </div>
          <h1>Side by side</h1>
        </div>
        {sheets.length > 0 && (
          <div className="acts">
            <CopyText className="btn" text={asText}>
              Copy as table
            </CopyText>
            <CopyText className="btn lite" text={`${origin}${addressOf(shown)}`}>
              Copy link
            </CopyText>
            <a className="btn lite" href={addressOf(shown).replace('/compare', '/compare/table')}>
              CSV
            </a>
            <PrintButton />
          </div>
        )}
      </div>
      {unknown.length > 0 && (
        <p className="red small" role="alert">
          There is no entry {unknown.map((slug) => `“${slug.slice(0, 60)}”`).join(', ')} that you may see. It is left
          out.
        </p>
      )}
      {beyond.length > 0 && (
        <p className="red small" role="alert">
          There are {PLACES} places; {beyond.length === 1 ? 'one more entry is' : `${beyond.length} more entries are`}{' '}
          left out.
        </p>
      )}
      {addable.length > 0 && (
        <Form action={'/compare' as Route} className="bar no-print" aria-label="Add an entry">
          {shown.map((slug) => (
            <input key={slug} type="hidden" name="entry" value={slug} />
          ))}
          <div className="field">
            <label htmlFor="add-entry">Add a scheme</label>
            <select id="add-entry" name="entry" key={shown.join(' ')}>
              {addable.map(({ slug, callNumber, title }) => (
                <option key={slug} value={slug}>
                  {callNumber} {title}
                </option>
              ))}
            </select>
          </div>
          <button type="submit" className="btn">
            Add
          </button>
        </Form>
      )}
      {sheets.length === 0 ? (
        <div className="lone">
          <Nothing />
          <p>Nothing is set side by side yet. Add a scheme above, or press Side by side on a sheet or the shortlist.</p>
        </div>
      ) : (
        <>
          <table className="three_">
            <thead>
              <tr>
                <th scope="col">
                  <span className="sr-only">Reading</span>
                </th>
                {sheets.map((sheet, k) => (
                  <th key={sheet.slug} scope="col">
                    <span className={`lk k${k + 1}`} />
                    <small>{sheet.callNumber}</small>
                    <Link href={`/sheets/${sheet.slug}` as Route}>{sheet.title}</Link>
                    <div className="state">
                      <Vial state={sheet.state} />
                      <span>{STATE_WORDS[sheet.state]}</span>
                    </div>
                    <Link
                      className="small no-print take-out"
                      href={addressOf(shown.filter((slug) => slug !== sheet.slug)) as Route}
                      aria-label={`Take out ${sheet.callNumber}`}
                    >
                      Take out
                    </Link>
                  </th>
                ))}
              </tr>
            </thead>
            <tbody>
              <tr>
                <th scope="row">Sketch, same axes</th>
                {sheets.map(({ slug, title }) => {
                  const sketch = sketches.get(slug);
                  return <td key={slug}>{sketch && <SharedSketch sketch={sketch} axes={axes} title={title} />}</td>;
                })}
              </tr>
              {allRows.map((row) => (
                <RowOf key={row.term} row={row} />
              ))}
            </tbody>
          </table>
          <ComparedPlots
            curves={curves}
            looks={looks}
            decays={sheets.every(
              ({ equation }) => equation?.includes('diffusion') && !equation.startsWith('advection'),
            )}
          />
        </>
      )}
    </div>
  );
}
