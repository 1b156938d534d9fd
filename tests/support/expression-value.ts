/** Value of a formula with + - * / ** and parentheses at numbers by name, to compare two ways of writing it. */
import { complex, create, all, type Complex, type MathType } from 'mathjs';

const { evaluate } = create(all!, {});

/** `I` is the imaginary unit. */
export function expressionValue(text: string, values: Readonly<Record<string, number>>): Complex {
  const value = evaluate(text.replaceAll('**', '^'), { ...values, I: complex(0, 1) }) as MathType;
  return typeof value === 'number' ? complex(value, 0) : (value as Complex);
}
