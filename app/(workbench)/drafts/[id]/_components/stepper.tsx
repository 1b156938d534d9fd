'use client';

interface StepperProps {
  name: string;
  value: number;
  min: number;
  max: number;
  onStep: (value: number) => void;
}

/** A whole number with a button on each side. */
export const Stepper = ({ name, value, min, max, onStep }: StepperProps) => (
  <span className="stepper" role="group" aria-label={name}>
    {name} <output aria-live="polite">{String(value).replace('-', '−')}</output>
    <button type="button" aria-label={`Fewer ${name}`} disabled={value <= min} onClick={() => onStep(value - 1)}>
      −
    </button>
    <button type="button" aria-label={`More ${name}`} disabled={value >= max} onClick={() => onStep(value + 1)}>
      +
    </button>
  </span>
);
