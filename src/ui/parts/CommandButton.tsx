import type { ReactNode } from 'react';
import { commandNamed } from '../commands.ts';
import { strokeText } from '../keyStrokes.ts';

const isMac = /mac/i.test(navigator.platform);

/** A button for a command of the table; its key stands in the tool tip. */
export function CommandButton({
  name,
  children,
  className = 'quiet',
  enabled,
}: {
  name: string;
  children?: ReactNode;
  className?: string;
  enabled?: boolean;
}) {
  const command = commandNamed(name);
  const key = strokeText(command.keys[0], isMac);
  return (
    <button
      type="button"
      className={className}
      title={`${command.label} (${key})`}
      aria-label={children === undefined || typeof children === 'string' ? undefined : command.label}
      aria-keyshortcuts={command.keys[0].replace('Mod', 'Control')}
      disabled={enabled === undefined ? false : !enabled}
      onClick={() => command.canRun() && command.run()}
    >
      {children ?? command.label}
    </button>
  );
}

export function Key({ stroke }: { stroke: string }) {
  return <kbd>{strokeText(stroke, isMac)}</kbd>;
}
