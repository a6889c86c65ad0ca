import { spawn } from 'node:child_process';
import { build, preview } from 'vite';

// `npm start`: builds the desk, serves it on this machine only, and opens it in the default browser.

await build({ logLevel: 'warn' });
const server = await preview({ preview: { host: '127.0.0.1', port: 4173, strictPort: false } });
const address = server.resolvedUrls?.local[0] ?? 'http://127.0.0.1:4173/';
process.stdout.write(`\nLinewright: ${address}\nThe sample spectrum is one click away. Ctrl-C ends it.\n`);
if (!process.env.CI && process.stdout.isTTY) openInBrowser(address);

function openInBrowser(url: string): void {
  const [command, args]: [string, string[]] =
    process.platform === 'darwin'
      ? ['open', [url]]
      : process.platform === 'win32'
        ? ['cmd', ['/c', 'start', '', url]]
        : ['xdg-open', [url]];
  const child = spawn(command, args, { stdio: 'ignore', detached: true });
  // no default browser on this machine: the address has been printed
  child.on('error', () => {});
  child.unref();
}
