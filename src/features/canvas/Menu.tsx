import { useEffect, useRef } from 'react';
import type { DiagramRow } from '#contract/api.ts';

export interface MenuAt {
  readonly x: number;
  readonly y: number;
  readonly row: DiagramRow;
  readonly address: string;
}

/** What can be done with one diagram, where it was pointed at. Esc or a click elsewhere closes it. */
export function Menu({ x, y, row, address, close }: MenuAt & { readonly close: () => void }) {
  const first = useRef<HTMLAnchorElement>(null);
  useEffect(() => first.current?.focus(), []);
  const copy = (text: string) => {
    void navigator.clipboard?.writeText(text);
    close();
  };
  return (
    <div className="canvas-menu" style={{ left: x, top: y }} role="menu" aria-label={`Diagram ${row.position}`}>
      <a ref={first} role="menuitem" href={address}>
        Open diagram {row.position}
      </a>
      <a role="menuitem" href={address} target="_blank" rel="noreferrer">
        Open in a new tab
      </a>
      <button role="menuitem" type="button" onClick={() => copy(new URL(address, window.location.href).href)}>
        Copy its link
      </button>
      <button role="menuitem" type="button" onClick={() => copy(row.id)}>
        Copy its label
      </button>
    </div>
  );
}
