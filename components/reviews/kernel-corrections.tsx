'use client';

import { type ReactNode, useRef, useState } from 'react';
import { LANGUAGE_NAMES } from '@/components/trials/finding-rows';
import { Tabs } from '@/components/ui/tabs';
import type { KernelLanguage } from '@/lib/codegen/kernel-request';
import { lineNow } from '@/lib/reviews/remark';
import { Fix, Pieces } from './fix';
import { type KernelDifference, type KernelLine, numberOf, textNow } from './kernel-difference';
import { LineRemarkForm } from './line-remark-form';
import { MarginThreads } from './margin-threads';
import type { ShownThread } from './part-remarks';
import type { RemarkActions } from './remark-actions';
import { ShowChoice } from './show-choice';

interface Remarking {
  revisionId: string;
  threads: readonly ShownThread[];
  actions: RemarkActions;
}

interface KernelCorrectionsProps {
  /** One a language. */
  kernels: readonly KernelDifference[];
  /** Left out where nobody remarks. */
  remarking?: Remarking;
}

function Line({ line }: { line: KernelLine }) {
  const [now, was] = [numberOf(line), 'was' in line ? line.was : null];
  const place = { 'data-n': now ?? '', 'data-o': was ?? '', 'data-line': now ?? undefined };
  switch (line.kind) {
    case 'same':
      return <span className="cl" {...place} dangerouslySetInnerHTML={{ __html: line.html || ' ' }} />;
    case 'changed':
      return (
        <span className="cl fx" {...place}>
          <Pieces pieces={line.pieces} />
        </span>
      );
    case 'added':
      return (
        <span className="cl fx addedline" {...place}>
          <Fix was={null} now={line.text || ' '} />
        </span>
      );
    case 'gone':
      return (
        <span className="cl fx goneline" {...place}>
          <Fix was={line.text || ' '} now={null} />
        </span>
      );
  }
}

const linesNow = (kernel: KernelDifference | undefined) =>
  kernel?.kind === 'kernel' ? kernel.lines.filter((line) => numberOf(line) !== null).map(textNow) : [];

/** The kernel with its corrections, and remarks beside their lines. */
export function KernelCorrections({ kernels, remarking }: KernelCorrectionsProps) {
  const [language, setLanguage] = useState<KernelLanguage>(kernels[0]?.language ?? 'c');
  const [chosenLine, setChosenLine] = useState<number | null>(null);
  const code = useRef<HTMLPreElement>(null);
  const shown = kernels.find((kernel) => kernel.language === language);
  const lines = linesNow(shown);
  const ofLanguage = (remarking?.threads ?? []).filter(({ thread }) => thread.language === language);
  const beside = ofLanguage.flatMap((one) => {
    const line = lineNow(one.thread, lines);
    return line === null ? [] : [{ ...one, line }];
  });
  const count = (one: KernelLanguage) => {
    const n = remarking?.threads.filter(({ thread }) => thread.language === one && thread.settledAt === null).length;
    return n ? ` (${n})` : '';
  };

  const chooseLine = (event: React.MouseEvent) => {
    const line = (event.target as HTMLElement).closest<HTMLElement>('[data-line]');
    const isOnNumber = line && event.clientX - line.getBoundingClientRect().left < 48;
    if (remarking && isOnNumber) setChosenLine(Number(line.dataset.line));
  };

  return (
    <>
      <div className="tabs">
        <Tabs
          label="Language"
          panel="kernel-text"
          options={kernels.map(({ language: value }) => ({ value, label: LANGUAGE_NAMES[value] + count(value) }))}
          value={language}
          onValue={setLanguage}
        />
        <div className="opt">
          <ShowChoice />
        </div>
      </div>
      <div className="minitube" />
      <div id="kernel-text" role="tabpanel" aria-label={`Kernel in ${LANGUAGE_NAMES[language]}`}>
        {shown?.kind === 'none' && <p className="cap nokernel">{shown.reason}</p>}
        {shown?.kind === 'kernel' && (
          <div className={beside.length > 0 ? 'kern corrk' : 'kern corrk alone'}>
            <pre
              ref={code}
              className="corr"
              tabIndex={0}
              role="group"
              aria-label={`${shown.fileName}, source text`}
              onClick={chooseLine}
            >
              <code>
                {shown.lines.map((line, k) => (
                  <Line key={`${language}:${k}`} line={line} />
                ))}
              </code>
            </pre>
            {remarking && beside.length > 0 && (
              <MarginThreads key={language} code={code} threads={beside} actions={remarking.actions} />
            )}
          </div>
        )}
      </div>
      {remarking && shown?.kind === 'kernel' && (
        <LineRemarks lines={lines} language={language} chosen={chosenLine} setChosen={setChosenLine} {...remarking} />
      )}
    </>
  );
}

interface LineRemarksProps extends Remarking {
  lines: readonly string[];
  language: KernelLanguage;
  /** 0 where the form is open and no line chosen yet. */
  chosen: number | null;
  setChosen: (line: number | null) => void;
}

function LineRemarks({ chosen, setChosen, ...rest }: LineRemarksProps): ReactNode {
  return (
    <div className="below">
      {chosen === null ? (
        <button type="button" className="word small" onClick={() => setChosen(0)}>
          Remark on a line
        </button>
      ) : (
        <LineRemarkForm chosen={chosen} setChosen={setChosen} {...rest} />
      )}
    </div>
  );
}
