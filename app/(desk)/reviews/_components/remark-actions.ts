import type { RemarkActions } from '@/components/reviews/remark-actions';
import { answer, remark, reopen, settle } from '../actions';

/** The actions behind remarks, for the pages that show them. */
export const REMARK_ACTIONS: RemarkActions = { write: remark, answer, settle, reopen };
