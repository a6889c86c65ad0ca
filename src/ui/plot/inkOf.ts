/** Colours of the tokens in force, for what cannot read them from CSS. */
export interface Ink {
  readonly ink: string;
  readonly muted: string;
  readonly faint: string;
  readonly hairline: string;
  readonly band: string;
  readonly fit: string;
  readonly accent: string;
  /** Wash of absorption bands of the air. */
  readonly airBand: string;
  readonly surface: string;
  readonly font: string;
  /** Which set of tokens these are: a scene in other ink is drawn anew. */
  readonly isDark: boolean;
}

/** Reads the tokens as they apply at `element`. */
export function inkOf(element: HTMLElement, isDark: boolean): Ink {
  const probe = document.createElement('span');
  element.append(probe);
  const token = (name: string) => {
    probe.style.color = `var(--${name})`;
    return getComputedStyle(probe).color;
  };
  const ink: Ink = {
    ink: token('ink'),
    muted: token('muted'),
    faint: token('faint'),
    hairline: token('hairline'),
    band: token('band'),
    fit: token('fit'),
    accent: token('accent'),
    airBand: token('air-band'),
    surface: token('surface'),
    font: getComputedStyle(element).fontFamily,
    isDark,
  };
  probe.remove();
  return ink;
}
