import 'react';

declare module 'react' {
  interface CSSProperties {
    /** Share in [0, 1] that a bar shows. */
    '--share'?: number;
  }
}
