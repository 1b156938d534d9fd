import type { Metadata } from 'next';
import { db } from '@/db/client';
import { listPeople } from '@/db/queries/people';
import { requireActor } from '@/lib/auth/require-actor';
import { moment } from '@/lib/entries/dates';
import { env } from '@/lib/env';
import { closingObstacle, roleObstacle, secondInvitationObstacle } from '@/lib/people/account-rules';
import { ROLES } from '@/lib/people/role';
import { standingText } from '@/lib/people/standing';
import { InviteForm } from './_components/invite-form';
import { PersonLine } from './_components/person-line';

export const metadata: Metadata = { title: 'People' };

export default async function PeoplePage() {
  const actor = await requireActor('administrator');
  const people = await listPeople(db);
  const now = new Date();
  const demoMode = env().LEVELBOOK_DEMO;
  const keepers = people.filter(
    (one) => one.role === 'administrator' && one.hasPassword && !one.disabledAt && (demoMode || !one.demo),
  );

  const lines = people.map((one) => {
    const account = {
      ...one,
      isClosed: one.disabledAt !== null,
      administrators: keepers.length,
    };
    const other = ROLES.find((role) => role !== one.role) ?? 'reader';
    return {
      id: one.id,
      name: one.name,
      email: one.email,
      role: one.role,
      isSelf: one.id === actor.id,
      standing: standingText(one, now),
      isClosed: account.isClosed,
      seen: one.seenAt ? `seen ${moment(one.seenAt.toISOString())}` : 'not seen yet',
      obstacles: {
        role: roleObstacle(actor, account, other),
        close: closingObstacle(actor, account),
        invite: secondInvitationObstacle(actor, account),
      },
    };
  });

  return (
    <>
      <header className="placehd">
        <h1>People</h1>
        <p className="q">
          {ROLES.map((role) => {
            const count = people.filter((one) => one.role === role && !one.disabledAt).length;
            return `${count} ${role}${count === 1 ? '' : 's'}`;
          }).join(', ')}
          ; each role includes the ones before it.
        </p>
      </header>
      <section aria-labelledby="invite">
        <h2 className="parthd" id="invite">
          Invite somebody
        </h2>
        <InviteForm />
      </section>
      <section aria-labelledby="accounts">
        <h2 className="parthd" id="accounts">
          Accounts
        </h2>
        <ul className="lines people">
          {lines.map((line) => (
            <PersonLine key={line.id} {...line} />
          ))}
        </ul>
      </section>
    </>
  );
}
