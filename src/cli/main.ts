#!/usr/bin/env node
import { differences } from './differences.ts';
import { limits } from './limits.ts';
import { readCommand } from './read.ts';
import { gasCommand, nameCommand, paperCommand, tableCommand } from './table.ts';
import { USAGE } from './usage.ts';

// The terminal: the engine of the desk for batches and scripts. Results on stdout or in --out, everything else on stderr.

const COMMANDS: Readonly<Record<string, (args: readonly string[]) => Promise<number>>> = {
  table: tableCommand,
  name: nameCommand,
  read: readCommand,
  limits,
  gas: gasCommand,
  paper: paperCommand,
  differences,
};

// a reader that has seen enough (`| head`) closes the pipe: that is no error
process.stdout.on('error', (error: NodeJS.ErrnoException) => {
  if (error.code !== 'EPIPE') throw error;
  process.exit(0);
});

const [word, ...args] = process.argv.slice(2);
const command = word === undefined ? undefined : COMMANDS[word];
if (command) {
  process.exitCode = await command(args);
} else if (word === undefined || word === 'help' || word === '--help' || word === '-h') {
  process.stdout.write(USAGE);
} else {
  process.stderr.write(`linewright: no command '${word}'; there are ${Object.keys(COMMANDS).join(', ')}\n`);
  process.exitCode = 2;
}
