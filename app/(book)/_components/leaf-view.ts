import type { SketchModel } from '@/lib/facts/sketch-model';
import type { ThetaPlotData } from '@/components/plots/theta-plot';

/** What the facing leaf shows of the chosen line beyond the line itself. */
export interface LeafView {
  /** MathML of the marching rule; null where there is none to write. */
  readonly formula: string | null;
  readonly sketch: SketchModel | null;
  readonly plot: ThetaPlotData | null;
  /** What the bound and the damping mean for the run. */
  readonly caption: string | null;
  /** Where the C kernel is served, or why there is none. */
  readonly kernel: { readonly address: string } | { readonly none: string };
}
