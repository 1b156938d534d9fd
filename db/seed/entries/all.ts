import type { DemoEntry } from '../demo-entry';
import { ADVECTION_FIRST } from './advection-first';

/** Every entry of the demo, in the order in which the book fills. */
export const DEMO_ENTRIES: readonly DemoEntry[] = [...ADVECTION_FIRST];
