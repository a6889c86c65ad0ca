import { dismissAlert, useDesk } from '../desk/deskStore.ts';
import { words } from '../words.ts';
import { Icon } from './Icon.tsx';

/** Problems with the user's material: they stay until they are dismissed and take nothing away. */
export function Alerts() {
  const alerts = useDesk((state) => state.alerts);
  return (
    <div className="strips" role="alert" aria-label={words.alert.label}>
      {alerts.map(({ id, text }) => (
        <div key={id} className="strip strip-problem">
          <p>{text}</p>
          <button
            type="button"
            className="quiet"
            aria-label={words.alert.dismiss}
            title={words.alert.dismiss}
            onClick={() => dismissAlert(id)}
          >
            <Icon name="close" />
          </button>
        </div>
      ))}
    </div>
  );
}
