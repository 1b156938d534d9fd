import type { SketchModel } from '@/lib/facts/sketch-model';
import { SectionSketch } from './section-sketch';
import { SlicesSketch } from './slices-sketch';

/** The sketch of a sheet, by the dimensions of its entry. */
export const LargeSketch = ({ model }: { model: SketchModel }) =>
  model.dims === 1 ? <SectionSketch model={model} /> : <SlicesSketch model={model} />;
