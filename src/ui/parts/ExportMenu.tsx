import { useEffect, useRef } from 'react';
import { TABLE_FORMATS, type TableFormatName } from '../../report/index.ts';
import { setDesk, useDesk } from '../desk/deskStore.ts';
import { copyTable, saveSession, saveTable } from '../desk/files.ts';
import { pickFile } from '../desk/pickFile.ts';
import { words } from '../words.ts';
import { Icon } from './Icon.tsx';

const FORMATS = Object.keys(TABLE_FORMATS) as TableFormatName[];

/** What can be saved: the table in every format, the session. */
export function ExportMenu() {
  const box = useRef<HTMLDetailsElement>(null);
  useClosing(box);
  const all = useDesk((state) => state.exportAll);
  const close = () => {
    if (box.current) box.current.open = false;
  };
  const item = (label: string, run: () => void) => (
    <button
      key={label}
      type="button"
      className="menu-item"
      onClick={() => {
        close();
        run();
      }}
    >
      {label}
    </button>
  );
  const { export: label } = words;
  return (
    <details className="menu" ref={box}>
      <summary aria-label={words.top.menu} className="primary">
        Export <Icon name="down" />
      </summary>
      <div className="menu-sheet">
        <fieldset>
          <legend>{label.which}</legend>
          <label className="choice">
            <input type="radio" name="which" checked={!all} onChange={() => setDesk({ exportAll: false })} />
            {label.accepted}
          </label>
          <label className="choice">
            <input type="radio" name="which" checked={all} onChange={() => setDesk({ exportAll: true })} />
            {label.all}
          </label>
        </fieldset>
        <div className="menu-group">
          {FORMATS.map((name) => item(label.save(TABLE_FORMATS[name].label), () => void saveTable(name)))}
          {item(label.copy, () => void copyTable())}
        </div>
        <div className="menu-group">
          {item(label.saveSession, saveSession)}
          {item(label.openSession, pickFile)}
        </div>
      </div>
    </details>
  );
}

/** Closes the sheet on Escape and on a click elsewhere. */
function useClosing(box: React.RefObject<HTMLDetailsElement | null>) {
  useEffect(() => {
    const close = () => {
      if (box.current) box.current.open = false;
    };
    const away = (event: PointerEvent) => {
      if (event.target instanceof Node && !box.current?.contains(event.target)) close();
    };
    const leave = (event: KeyboardEvent) => {
      if (event.key !== 'Escape' || !box.current?.open) return;
      close();
      box.current.querySelector('summary')?.focus();
    };
    window.addEventListener('pointerdown', away);
    window.addEventListener('keydown', leave);
    return () => {
      window.removeEventListener('pointerdown', away);
      window.removeEventListener('keydown', leave);
    };
  }, [box]);
}
