/** The whole book of the demo, in the order of its call numbers within each part. */
import type { DemoEntry } from '../demo-entry';
import { ADVECTION } from './advection';
import { DIFFUSION } from './diffusion';
import { STENCILS } from './stencils';
import { TIME_METHODS } from './time-methods';
import { WAVES } from './waves';

export const DEMO_ENTRIES: readonly DemoEntry[] = [...ADVECTION, ...DIFFUSION, ...WAVES, ...TIME_METHODS, ...STENCILS];
