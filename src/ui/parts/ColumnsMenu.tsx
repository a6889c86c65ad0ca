import { setDesk, useDesk } from '../desk/deskStore.ts';
import { isAlwaysShown, TABLE_COLUMNS } from '../table/columns.ts';
import { words } from '../words.ts';
import { Menu } from './Menu.tsx';

/** Which columns the table shows. */
export function ColumnsMenu() {
  const hidden = useDesk((state) => state.hiddenColumns);
  const toggle = (key: string) =>
    setDesk({ hiddenColumns: hidden.includes(key) ? hidden.filter((each) => each !== key) : [...hidden, key] });
  return (
    <Menu label={words.table.columns} className="small">
      {() => (
        <fieldset>
          <legend>{words.table.columnsShown}</legend>
          {TABLE_COLUMNS.filter((column) => !isAlwaysShown(column)).map(({ key, head, unit }) => (
            <label key={key} className="choice">
              <input type="checkbox" checked={!hidden.includes(key)} onChange={() => toggle(key)} />
              {head} {unit && <span className="unit">{unit}</span>}
            </label>
          ))}
        </fieldset>
      )}
    </Menu>
  );
}
