import { parentPort } from 'node:worker_threads';
import { examine, ReadError } from '../index.ts';
import type { Reply, Request } from './message.ts';

/*
 * Reads one file at a time, apart from the command, which can thereby stop what
 * hangs or swells: a hostile PDF keeps a thread busy for as long as it likes.
 */

parentPort?.on('message', async (request: Request) => {
  parentPort?.postMessage(await replyTo(request));
});

async function replyTo({ bytes, name }: Request): Promise<Reply> {
  try {
    return { kind: 'examined', examination: await examine(bytes, name) };
  } catch (problem) {
    if (problem instanceof ReadError) return { kind: 'unreadable', sentence: problem.message };
    const { message, stack = '' } = problem instanceof Error ? problem : new Error(String(problem));
    return { kind: 'fault', message, stack };
  }
}
