import { type ReactNode, useId, useRef } from 'react';
import { Icon } from './Icon.tsx';

/** Pixels between a button and its sheet. */
const GAP = 4;

interface Props {
  readonly label: string;
  /** Read aloud instead of the label, when that says too little. */
  readonly name?: string;
  readonly className: string;
  /** The sheet; `close` puts it away. */
  readonly children: (close: () => void) => ReactNode;
}

/** A button and a sheet under it, on top of everything; the browser closes it on Escape and on a click elsewhere. */
export function Menu({ label, name, className, children }: Props) {
  const id = useId();
  const button = useRef<HTMLButtonElement>(null);
  const sheet = useRef<HTMLDivElement>(null);
  const place = () => {
    if (!button.current || !sheet.current) return;
    const { top, bottom, right } = button.current.getBoundingClientRect();
    const below = bottom + sheet.current.offsetHeight + GAP < window.innerHeight;
    sheet.current.style.right = `${window.innerWidth - right}px`;
    sheet.current.style.top = below ? `${bottom + GAP}px` : `${Math.max(GAP, top - GAP - sheet.current.offsetHeight)}px`;
  };
  return (
    <>
      <button ref={button} type="button" className={`menu-button ${className}`} aria-label={name} popoverTarget={id}>
        {label} <Icon name="down" />
      </button>
      <div ref={sheet} id={id} popover="auto" className="menu-sheet" onToggle={place}>
        {children(() => sheet.current?.hidePopover())}
      </div>
    </>
  );
}
