import type { Metadata } from 'next';
import { leaveEverywhere } from '@/app/(book)/actions';
import { SignOutButtons } from '@/components/ui/sign-out-buttons';
import { db } from '@/db/client';
import { findAccount } from '@/db/queries/people';
import { listSessions } from '@/db/queries/sessions';
import { currentSession } from '@/lib/auth/current-actor';
import { requireActor } from '@/lib/auth/require-actor';
import { moment } from '@/lib/entries/dates';
import { deviceName } from '@/lib/people/device';
import { PasswordForm } from './_components/password-form';
import { ProfileForm } from './_components/profile-form';
import { SessionList } from './_components/session-list';

export const metadata: Metadata = { title: 'Your profile' };

export default async function ProfilePage() {
  const actor = await requireActor();
  const [account, sessions, session] = await Promise.all([
    findAccount(db, actor.id),
    listSessions(db, actor.id),
    currentSession(),
  ]);

  return (
    <>
      <header className="placehd">
        <h1>Your profile</h1>
        <p className="q">
          {actor.name}, {actor.email}, {actor.role}. An administrator changes address and role.
        </p>
      </header>
      <div className="twoup">
        <section aria-labelledby="letters">
          <h2 className="parthd" id="letters">
            Name and letters
          </h2>
          <ProfileForm name={actor.name} letterWish={account?.letterWish ?? 'at-once'} />
        </section>
        <section aria-labelledby="password">
          <h2 className="parthd" id="password">
            Password
          </h2>
          <PasswordForm />
        </section>
      </div>
      <section aria-labelledby="sessions">
        <h2 className="parthd" id="sessions">
          Where you are signed in
        </h2>
        <SessionList
          sessions={sessions.map(({ id, userAgent, address, seenAt, createdAt }) => ({
            id,
            device: deviceName(userAgent),
            address,
            seen: moment(seenAt.toISOString()),
            since: moment(createdAt.toISOString()),
            isThis: id === session?.sessionId,
          }))}
        />
        <div className="pager leave">
          <SignOutButtons signOutEverywhere={leaveEverywhere} />
        </div>
      </section>
    </>
  );
}
