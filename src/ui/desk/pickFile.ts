import { openAny } from './files.ts';

/** Asks for a file with the browser's own dialog. */
export function pickFile(): void {
  const input = document.createElement('input');
  input.type = 'file';
  input.onchange = () => {
    const file = input.files?.[0];
    if (file) void openAny(file);
  };
  input.click();
}
