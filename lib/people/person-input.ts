/** What forms about people accept. */
import { z } from 'zod';
import { LETTER_WISHES } from '@/lib/mail/letter';
import { ROLES } from './role';

export const PersonName = z
  .string()
  .trim()
  .min(1, 'accepted: a name such as "Ada Lindqvist"')
  .max(120, 'accepted: at most 120 characters')
  .regex(/^[^\p{Cc}]*$/u, 'accepted: one line without control characters');
export const PersonEmail = z
  .string()
  .trim()
  .max(254, 'accepted: at most 254 characters')
  .transform((text) => text.toLowerCase())
  .pipe(z.email('accepted: an e-mail address such as ada@example.org'));
export const PersonRole = z.enum(ROLES, { error: `accepted: ${ROLES.join(', ')}` });

export const Invitation = z.object({ name: PersonName, email: PersonEmail, role: PersonRole });
export type Invitation = z.output<typeof Invitation>;

/** Why something was done, for the ledger. */
export const Reason = z.string().trim().max(300, 'accepted: at most 300 characters');
export const NeededReason = Reason.min(1, 'accepted: a sentence that says why; the ledger keeps it');

export const RoleChange = z.object({ personId: z.uuid(), from: PersonRole, to: PersonRole, reason: Reason });
export const Closing = z.object({ personId: z.uuid(), reason: NeededReason });
export const Opening = z.object({ personId: z.uuid(), reason: NeededReason });
export const Profile = z.object({
  name: PersonName,
  letterWish: z.enum(LETTER_WISHES, { error: `accepted: ${LETTER_WISHES.join(', ')}` }),
});

/** The rules of a password ask for the person; here it is only kept from being endless. */
export const LinkUse = z.object({ secret: z.string().max(100), password: z.string().max(1000) });
