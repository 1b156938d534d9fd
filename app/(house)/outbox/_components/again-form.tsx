'use client';

import { ActionForm } from '@/components/ui/action-form';
import { sendLetterAgain } from '../actions';

/** Sends one letter again, or all that were given up. */
export const AgainForm = ({ letterId, label }: { letterId?: string; label: string }) => (
  <ActionForm act={sendLetterAgain} submit="Send again" busy="Asking" look="plain" label={label} className="again">
    {letterId && <input type="hidden" name="letterId" value={letterId} />}
  </ActionForm>
);
