import process from 'node:process';

/** Progress goes to stderr, so that stdout carries a command's product and nothing else. */
export function say(line) {
  process.stderr.write(`${line}\n`);
}

/** A failure that one clear line explains; anything else is a defect and shows its stack. */
export class SetupError extends Error {
  name = 'SetupError';
}
