import Link from 'next/link';
import type { SheetView } from '@/lib/entries/entry';
import { includesRole, type Role } from '@/lib/people/role';

/** A clause as a sentence of its own: with one full stop at its end. */
const sentence = (text: string) => `${text.trim().replace(/\.$/, '')}.`;

/** What must be said before anything else: gone, replaced, not vetted, does not hold. */
export function Banners({ sheet, role }: { sheet: SheetView; role: Role }) {
  const { state, stateReason, replacement, problems } = sheet;
  const isGone = state === 'withdrawn' || state === 'superseded';
  const errors = problems.filter(({ severity }) => severity === 'error');
  return (
    <>
      {isGone && (
        <div className="banner" role="note">
          <p>
            <b>
              {state === 'withdrawn'
                ? 'This revision is withdrawn: do not use it in new code.'
                : 'This revision is superseded.'}
            </b>{' '}
            {stateReason && sentence(stateReason)}
          </p>
          {replacement && (
            <p>
              In its place:{' '}
              <Link href={`/sheets/${replacement.slug}/${replacement.revision}`}>
                {replacement.callNumber} {replacement.title}, revision {replacement.revision}
              </Link>
            </p>
          )}
        </div>
      )}
      {state === 'returned' && stateReason && (
        <div className="banner" role="note">
          <p>
            <b>Returned to its author.</b> {sentence(stateReason)}
          </p>
        </div>
      )}
      {problems.length > 0 && (
        <div className={errors.length > 0 ? 'banner' : 'banner plain'} role="note">
          <p>
            <b>{errors.length > 0 ? 'This definition does not hold.' : 'The definition holds, with a warning.'}</b>
          </p>
          <ul className="small">
            {problems.map(({ pointer, column, message }) => (
              <li key={`${pointer}:${column ?? ''}:${message}`}>
                {pointer && (
                  <code>
                    {pointer}
                    {column !== undefined && `, column ${column}`}
                  </code>
                )}{' '}
                {message}
              </li>
            ))}
          </ul>
        </div>
      )}
      {sheet.vettingObstacle && includesRole(role, 'maintainer') && !isGone && (
        <div className="banner plain" role="note">
          <p>
            <b>Not vetted yet.</b> {sentence(sheet.vettingObstacle)}
          </p>
        </div>
      )}
    </>
  );
}
