'use server';

import { redeemLink } from '@/lib/people/redeem-link';
import { LinkUse } from '@/lib/people/person-input';
import { openAction } from '@/lib/web/open-action';

const accept = openAction(LinkUse, ({ secret, password }) => redeemLink('invitation', secret, password));

export const acceptInvitation = async (form: FormData) => accept(form);
