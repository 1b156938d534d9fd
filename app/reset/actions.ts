'use server';

import { z } from 'zod';
import { LinkUse, PersonEmail } from '@/lib/people/person-input';
import { redeemLink } from '@/lib/people/redeem-link';
import { requestPasswordReset } from '@/lib/people/request-password-reset';
import { openAction } from '@/lib/web/open-action';

const request = openAction(z.object({ email: PersonEmail }), ({ email }, address) =>
  requestPasswordReset(email, address),
);
export const askForPassword = async (form: FormData) => request(form);

const reset = openAction(LinkUse, ({ secret, password }) => redeemLink('password-reset', secret, password));
export const setNewPassword = async (form: FormData) => reset(form);
