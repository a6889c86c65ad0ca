const PATHS = {
  undo: 'M5 4 2 7l3 3M2.5 7H9a4 4 0 0 1 0 8H6',
  redo: 'M11 4l3 3-3 3M13.500 7H7a4 4 0 0 0 0 8h3',
  left: 'M10 3 5 8l5 5',
  right: 'M6 3l5 5-5 5',
  plus: 'M8 3v10M3 8h10',
  minus: 'M3 8h10',
  whole: 'M2 5V3h3M11 3h3v2M14 11v2h-3M5 13H2v-2M5 8h6',
  close: 'M4 4l8 8M12 4l-8 8',
  check: 'M3 8.500 6.500 12 13 4.500',
  down: 'M4 6l4 4 4-4',
  theme: 'M8 2a6 6 0 1 0 0 12ZM8 2a6 6 0 0 1 0 12',
} as const;

/** A drawn sign beside a named button: decoration for the screen reader. */
export function Icon({ name }: { name: keyof typeof PATHS }) {
  return (
    <svg className="icon" viewBox="0 0 16 16" width="16" height="16" aria-hidden="true">
      <path d={PATHS[name]} />
    </svg>
  );
}
