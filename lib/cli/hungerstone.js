#!/usr/bin/env node
// The one door: `npm start`, `npm test`, `npx hungerstone …` all come in here. Nothing but `node:` may be imported, by
// this file or by ./setup, before the set-up has installed the packages.
import process from 'node:process';

const [major, minor] = process.versions.node.split('.').map(Number);
if (major < 20 || (major === 20 && minor < 19)) {
  process.stderr.write(`Hungerstone needs Node.js 20.19 or later; this is ${process.versions.node}.\n`);
  process.exit(1);
}

const { launch } = await import('./setup/launch.js');
const code = await launch(process.argv.slice(2));
// What is still on its way to a pipe gets there first; workers and open connections do not keep us.
process.stdout.write('', () => process.exit(code));
