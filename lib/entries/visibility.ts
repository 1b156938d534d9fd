import type { Actor } from '@/lib/people/actor';
import { includesRole } from '@/lib/people/role';
import { PUBLISHED_STATES, REVISION_STATES, type RevisionState } from './revision-state';

export interface VisibleStates {
  /** Whoever wrote it. */
  anyones: readonly RevisionState[];
  /** Only the viewer's own. */
  own: readonly RevisionState[];
}

/** Readers see what is published; contributors also what is in review and their own; maintainers all. */
export function visibleStates(viewer: Pick<Actor, 'role'>): VisibleStates {
  if (includesRole(viewer.role, 'maintainer')) return { anyones: REVISION_STATES, own: [] };
  if (includesRole(viewer.role, 'contributor'))
    return { anyones: [...PUBLISHED_STATES, 'in-review'], own: ['draft', 'returned'] };
  return { anyones: PUBLISHED_STATES, own: [] };
}
