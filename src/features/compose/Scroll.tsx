import type { ReactNode } from 'react';

// A scrolling region must take the focus, or keys could not scroll it.
const FOCUSABLE = { tabIndex: 0 };

/** A region that may be wider than the page (a formula): it scrolls by itself, by keyboard too, and carries a name. */
export function Scroll({ label, children }: { readonly label: string; readonly children: ReactNode }) {
  return (
    <section className="scroll-x" aria-label={label} {...FOCUSABLE}>
      {children}
    </section>
  );
}
