import type { RefObject } from 'react';

interface LookForProps {
  field: RefObject<HTMLInputElement | null>;
  text: string;
  onText: (text: string) => void;
  shown: number;
  total: number;
}

/** The one field of the catalog, and how many lines it leaves. */
export function LookFor({ field, text, onText, shown, total }: LookForProps) {
  return (
    <form className="ask" role="search" onSubmit={(event) => event.preventDefault()}>
      <label>
        <span className="lab">Look for</span>
        <input
          ref={field}
          type="search"
          value={text}
          placeholder="a scheme, a code, a number"
          autoComplete="off"
          spellCheck={false}
          maxLength={120}
          onChange={(event) => onText(event.target.value)}
          onKeyDown={(event) => {
            if (event.key === 'Escape') onText('');
          }}
        />
      </label>
      <kbd title="Press / to look for something">/</kbd>
      <span className="small q shown" aria-live="polite">
        <b className="num">{shown}</b> of {total} {total === 1 ? 'line' : 'lines'}
      </span>
    </form>
  );
}
