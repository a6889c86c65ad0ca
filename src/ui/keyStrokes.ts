/** The part of a keyboard event that says which key was struck. */
export interface Stroke {
  readonly key: string;
  readonly ctrlKey: boolean;
  readonly metaKey: boolean;
  readonly altKey: boolean;
  readonly shiftKey: boolean;
}

/** A stroke as the command table spells it: "ArrowRight", "u", "?", "Mod+Shift+z". Shift is part of a printed sign, so it is only named with "Mod". */
export function strokeName(stroke: Stroke): string {
  const key = stroke.key.length === 1 ? stroke.key.toLowerCase() : stroke.key;
  const mod = stroke.ctrlKey || stroke.metaKey;
  return `${mod ? 'Mod+' : ''}${stroke.altKey ? 'Alt+' : ''}${stroke.shiftKey && (mod || stroke.key.length > 1) ? 'Shift+' : ''}${key}`;
}

/** How a stroke is printed for a person. */
export function strokeText(name: string, isMac: boolean): string {
  const printed: Record<string, string> = {
    Mod: isMac ? '⌘' : 'Ctrl',
    Shift: isMac ? '⇧' : 'Shift',
    ArrowRight: '→',
    ArrowLeft: '←',
    ArrowUp: '↑',
    ArrowDown: '↓',
    Backspace: isMac ? '⌫' : 'Backspace',
    Enter: isMac ? '↩' : 'Enter',
  };
  if (name === '+') return '+';
  return name
    .split('+')
    .map((part) => printed[part] ?? (part.length === 1 ? part.toUpperCase() : part))
    .join(isMac ? '' : ' ');
}

/** A field in which letters are text: no command may take them. */
export const takesText = (target: EventTarget | null): boolean =>
  target instanceof HTMLElement &&
  (target.isContentEditable || target instanceof HTMLTextAreaElement || target instanceof HTMLSelectElement || isTextInput(target));

function isTextInput(target: HTMLElement): boolean {
  return target instanceof HTMLInputElement && !['checkbox', 'radio', 'button', 'range'].includes(target.type);
}

/** Whether a key belongs to the control that has the focus: Enter to all that can be pressed, arrows to what is walked with them. */
export function belongsTo(target: EventTarget | null, key: string): boolean {
  if (!(target instanceof HTMLElement)) return false;
  if (key === 'Enter') return target.closest('button, a[href], summary, input, [role="tab"]') !== null;
  if (key === 'ArrowLeft' || key === 'ArrowRight') return target.closest('input:not([type="checkbox"]), [role="tab"]') !== null;
  return key.startsWith('Arrow') && target.closest('input:not([type="checkbox"])') !== null;
}
