'use client';

import { useEffect, useRef } from 'react';
import type { KeyDeed } from './keys';

const SIGNS: Readonly<Record<string, string>> = { ArrowDown: '↓', ArrowUp: '↑' };

interface KeyListProps {
  /** null while closed. */
  deeds: readonly KeyDeed[] | null;
  onClose: () => void;
  lettersOff: boolean;
  onLettersOff: (off: boolean) => void;
}

/** The keys that work on this page. */
export function KeyList({ deeds, onClose, lettersOff, onLettersOff }: KeyListProps) {
  const dialog = useRef<HTMLDialogElement>(null);
  useEffect(() => {
    if (deeds) dialog.current?.showModal();
  }, [deeds]);

  return (
    <dialog ref={dialog} className="keylist" aria-labelledby="keylist-title" onClose={onClose}>
      {deeds && (
        <>
          <h2 id="keylist-title" className="h">
            Keys of this page
          </h2>
          <dl>
            {[...deeds, { keys: ['?'], label: 'This list' }].map(({ keys, label }) => (
              <div key={label}>
                <dt>
                  {keys.map((key) => (
                    <kbd key={key}>{SIGNS[key] ?? key}</kbd>
                  ))}
                </dt>
                <dd>{label}</dd>
              </div>
            ))}
          </dl>
          <label className="tickbox">
            <input type="checkbox" checked={!lettersOff} onChange={(event) => onLettersOff(!event.target.checked)} />
            Single-letter keys are on
          </label>
          <div className="acts">
            <button type="button" className="btn" onClick={() => dialog.current?.close()}>
              Close
            </button>
          </div>
        </>
      )}
    </dialog>
  );
}
