/** Statements and declarations of Fortran, within its line. */
import { coefficientSource, type Coefficient } from './coefficient';
import { infix, type Assignment } from './expression-tree';
import { FORTRAN } from './fortran';
import { wrapStatement } from './wrap-text';

const WIDTH = 100;
export const statement = (text: string) => wrapStatement(text, WIDTH, ' &');
export const listed = (head: string, items: readonly string[]) => statement(`${head}(${items.join(', ')})`);

export function coefficientLines(coefficients: readonly Coefficient[], symbols: readonly string[]): string {
  return coefficients
    .map(({ name, value }) => statement(`${name} = ${coefficientSource(value, symbols, FORTRAN.literal)}`))
    .join('\n');
}
export function assignmentLine(assignment: Assignment): string {
  const target = assignment.kind === 'value' ? assignment.name : FORTRAN.element(assignment.array, 0);
  return statement(`${target} = ${infix(assignment.node, FORTRAN)}`);
}
export const scalarDeclaration = (names: readonly string[]) =>
  names.length > 0 ? `real(wp), intent(in)    :: ${names.join(', ')}` : '';
export const localDeclaration = (names: readonly string[]) =>
  names.length > 0 ? `real(wp) :: ${names.join(', ')}` : '';
