'use client';

import { CopyButton } from './copy-button';

/** A copy button whose text is at hand; for server components, which cannot pass functions. */
export const CopyText = ({
  text,
  className,
  children,
}: {
  text: string;
  className: string;
  children: React.ReactNode;
}) => (
  <CopyButton className={className} textOf={() => text}>
    {children}
  </CopyButton>
);
