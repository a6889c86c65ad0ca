import { TABLE_FORMATS, type TableFormatName } from '../../report/index.ts';
import { setDesk, useDesk } from '../desk/deskStore.ts';
import { copyTable, saveSession, saveTable } from '../desk/files.ts';
import { pickFile } from '../desk/pickFile.ts';
import { words } from '../words.ts';
import { Menu } from './Menu.tsx';

const FORMATS = Object.keys(TABLE_FORMATS) as TableFormatName[];

/** What can be saved: the table in every format, the session. */
export function ExportMenu() {
  const all = useDesk((state) => state.exportAll);
  const { export: label } = words;
  return (
    <Menu label={words.top.export} name={words.top.menu} className="primary">
      {(close) => {
        const item = (text: string, run: () => void) => (
          <button
            key={text}
            type="button"
            className="menu-item"
            onClick={() => {
              close();
              run();
            }}
          >
            {text}
          </button>
        );
        return (
          <>
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
          </>
        );
      }}
    </Menu>
  );
}
