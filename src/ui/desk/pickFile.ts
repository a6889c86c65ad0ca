import { openAll } from './files.ts';

/** Asks for files with the browser's own dialog. */
export function pickFile(): void {
  const input = document.createElement('input');
  input.type = 'file';
  input.multiple = true;
  input.onchange = () => {
    void openAll([...(input.files ?? [])]);
  };
  input.click();
}
