import type { GasSettings } from '../../plasma/index.ts';
import { set } from '../desk/decisions.ts';

/** Changes settings of the gas as one undoable step; undefined leaves a setting to the program. */
export function setGas(change: Partial<GasSettings>, sentence: string): void {
  set((settings) => {
    const gas = Object.fromEntries(Object.entries({ ...settings.gas, ...change }).filter(([, value]) => value !== undefined));
    return { ...settings, gas: Object.keys(gas).length > 0 ? gas : undefined };
  }, sentence);
}
