'use client';

import type { Route } from 'next';
import Form from 'next/form';
import { useEffect, useRef } from 'react';

interface AskFormProps {
  /** An address of ours. */
  action: string;
  label: string;
  className: string;
  /** Values of the address: when it changes by a link, the fields follow. */
  values: Readonly<Record<string, string>>;
  children: React.ReactNode;
}

/** A question as a form whose answer is an address: sent when a field is left or a choice is made; a button does it without scripts. */
export function AskForm({ action, label, className, values, children }: AskFormProps) {
  const form = useRef<HTMLFormElement>(null);
  const shown = JSON.stringify(values);

  useEffect(() => {
    const element = form.current;
    if (!element) return;
    for (const [name, value] of Object.entries(JSON.parse(shown) as Record<string, string>)) {
      const field = element.elements.namedItem(name);
      if (field instanceof RadioNodeList || field instanceof HTMLInputElement || field instanceof HTMLSelectElement)
        field.value = value;
    }
  }, [shown]);

  useEffect(() => {
    const element = form.current;
    const send = () => element?.requestSubmit();
    element?.addEventListener('change', send);
    return () => element?.removeEventListener('change', send);
  }, []);

  return (
    <Form ref={form} action={action as Route} scroll={false} aria-label={label} className={className} noValidate>
      {children}
    </Form>
  );
}
