import { mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { dirname } from 'node:path';
import process from 'node:process';
import { setTimeout as wait } from 'node:timers/promises';
import { say } from './say.js';

/** Runs `work` while this process alone holds the lock file; others wait for it. The lock of a process that no longer
 *  lives is taken over.
 *  @param file   path of the lock file
 *  @param what   what is being done, for the line that a waiting process prints
 *  @returns      what `work` returns */
export async function withLock(file, what, work) {
  await acquire(file, what);
  try {
    return await work();
  } finally {
    rmSync(file, { force: true });
  }
}

async function acquire(file, what) {
  mkdirSync(dirname(file), { recursive: true });
  for (let told = false; ; ) {
    if (await tryAcquire(file)) return;
    const holder = holderOf(file);
    if (holder !== null && !isAlive(holder)) {
      rmSync(file, { force: true });
      continue;
    }
    if (!told) say(`Waiting for another start to finish (${what}, process ${holder ?? 'unknown'}) …`);
    told = true;
    await wait(200);
  }
}

async function tryAcquire(file) {
  try {
    writeFileSync(file, String(process.pid), { flag: 'wx' });
  } catch (error) {
    if (error.code === 'EEXIST') return false;
    throw error;
  }
  // Two processes may both have found the same dead holder, and the slower one then removes the quicker one's lock:
  // the one whose number still stands after a moment has it.
  await wait(30);
  return holderOf(file) === process.pid;
}

/** The process number in the lock file; null when it is gone or not yet written. */
function holderOf(file) {
  try {
    return Number(readFileSync(file, 'utf8')) || null;
  } catch {
    return null;
  }
}

function isAlive(pid) {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return error.code === 'EPERM';
  }
}
