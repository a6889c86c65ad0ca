import type { ReadingChoices } from '../../readers/index.ts';
import { words } from '../words.ts';
import { set } from './decisions.ts';

/** Changes how the file is read; the sentence goes into the history. */
export function chooseReading(choices: ReadingChoices, sentence: string): void {
  set((settings) => ({ ...settings, reading: choices }), sentence);
}

export function chooseMedium(medium: 'air' | 'vacuum'): void {
  set((settings) => ({ ...settings, reading: { ...settings.reading, medium } }), words.medium.changed(words.medium[medium]));
}
