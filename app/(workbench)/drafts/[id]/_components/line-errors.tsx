import type { LineError } from '@/lib/entries/definition-csv';

/** What is wrong in a text, line by line. */
export const LineErrors = ({ id, errors }: { id?: string; errors: readonly LineError[] }) => (
  <ul id={id} className="lineerrors" role={errors.length > 0 ? 'alert' : undefined}>
    {errors.map(({ line, message }) => (
      <li key={`${line}:${message}`} className="fail small">
        {line > 0 && `Line ${line}: `}
        {message}
      </li>
    ))}
  </ul>
);
