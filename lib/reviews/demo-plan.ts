/** What shall become of a revision of the demo. People are named by their e-mail address. */
import type { DemoEmail } from '@/lib/people/demo-people';

export type DemoPlan =
  /** Stays on the author's table. */
  | { become: 'draft' }
  /** Submitted and tried; signed by those named, which is fewer than it takes. */
  | { become: 'in-review'; signedBy?: DemoEmail[] }
  /** Submitted and sent back. */
  | { become: 'returned'; by: DemoEmail; reason: string }
  /** Submitted, tried, signed by two (default: two maintainers who are not the author) and vetted when the trial passes. */
  | { become: 'vetted'; signedBy?: [DemoEmail, DemoEmail]; sentences?: [string, string] }
  /** The same, and afterwards withdrawn with this reason; `useInstead` is the slug of what stands in its place. */
  | { become: 'withdrawn'; by: DemoEmail; reason: string; useInstead?: string };

/** As it is kept beside the revision until the worker has carried it out. */
export interface StoredDemoPlan {
  author: DemoEmail;
  plan: DemoPlan;
  /** Recorded once the revision is vetted. */
  adoptions: { code: string; purpose: string; by: DemoEmail }[];
}
