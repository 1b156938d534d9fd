'use client';

import { ActionForm } from '@/components/ui/action-form';
import { Choice, Field } from '@/components/ui/field';
import { ROLES, type Role } from '@/lib/people/role';
import { changeRole, closePerson, invitePersonAgain, openPerson } from '../actions';

const WORDS = Object.fromEntries(ROLES.map((role) => [role, role]));

export interface PersonLineProps {
  id: string;
  name: string;
  email: string;
  role: Role;
  isSelf: boolean;
  /** How the account stands, in words. */
  standing: string;
  isClosed: boolean;
  seen: string;
  /** Why the button is not offered; null where it is. */
  obstacles: { role: string | null; close: string | null; invite: string | null };
}

/** One person: the line, and what can be done about it below. */
export function PersonLine({ id, name, email, role, isSelf, standing, isClosed, seen, obstacles }: PersonLineProps) {
  const hidden = <input type="hidden" name="personId" value={id} />;
  return (
    <li>
      <details>
        <summary>
          <span className="who">
            <b>{name}</b>
            {isSelf && <small> (you)</small>}
            <small>{email}</small>
          </span>
          <span>{role}</span>
          <span className={isClosed ? 'red' : undefined}>{standing}</span>
          <span className="q">{seen}</span>
          <span className="word" aria-hidden="true">
            Change
          </span>
        </summary>
        <div className="panel">
          {isClosed ? (
            <ActionForm act={openPerson} submit="Open the account again" busy="Opening" look="plain">
              {hidden}
              <Field label="Why" name="reason" maxLength={300} hint="The ledger keeps it." required />
            </ActionForm>
          ) : (
            <>
              {obstacles.role ? (
                <p className="small q">{obstacles.role}</p>
              ) : (
                // The key takes up the role that another window may have given meanwhile.
                <ActionForm
                  key={role}
                  act={changeRole}
                  submit="Change the role"
                  busy="Changing"
                  look="plain"
                  done={() => 'Done; it counts from now on.'}
                >
                  {hidden}
                  <input type="hidden" name="from" value={role} />
                  <Choice label="Role" name="to" words={WORDS} defaultValue={role} />
                  <Field
                    label="Why"
                    name="reason"
                    maxLength={300}
                    hint="If there is something to say; the ledger keeps it."
                  />
                </ActionForm>
              )}
              {obstacles.invite === null && (
                <ActionForm
                  act={invitePersonAgain}
                  submit="Send another invitation"
                  busy="Sending"
                  look="plain"
                  done={() => 'On its way; the links of earlier letters have ended.'}
                >
                  {hidden}
                </ActionForm>
              )}
              {obstacles.close ? (
                obstacles.close !== obstacles.role && <p className="small q">{obstacles.close}</p>
              ) : (
                <ActionForm act={closePerson} submit="Close the account" busy="Closing" look="warn">
                  {hidden}
                  <Field
                    label="Why"
                    name="reason"
                    maxLength={300}
                    hint="Sessions end at once; what the person wrote stays. The ledger keeps the sentence."
                    required
                  />
                </ActionForm>
              )}
            </>
          )}
        </div>
      </details>
    </li>
  );
}
