import { type RefObject, useEffect } from 'react';

/** Closes an open <details> on Escape, giving the focus back to its summary, and on a press outside. */
export function useDismissal(menu: RefObject<HTMLDetailsElement | null>) {
  useEffect(() => {
    const close = () => menu.current?.removeAttribute('open');
    const onKey = (event: KeyboardEvent) => {
      if (event.key !== 'Escape' || !menu.current?.open) return;
      close();
      menu.current.querySelector('summary')?.focus();
    };
    const onPress = (event: PointerEvent) => {
      if (event.target instanceof Node && !menu.current?.contains(event.target)) close();
    };
    document.addEventListener('keydown', onKey);
    document.addEventListener('pointerdown', onPress);
    return () => {
      document.removeEventListener('keydown', onKey);
      document.removeEventListener('pointerdown', onPress);
    };
  }, [menu]);
}
