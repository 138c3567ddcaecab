import { Worker } from 'node:worker_threads';
import type { Examination } from '../model/index.ts';
import { ReadError } from '../read/read-error.ts';
import type { Reply, Request } from './message.ts';

/** Limits on the work on one file. */
export interface Limits {
  readonly seconds: number;
  readonly megabytes: number;
}

/**
 * Examines files one after the other in a worker that is started when first
 * needed, kept for the next file, and replaced when it had to be stopped.
 */
export interface Examiner {
  readonly examine: (bytes: Uint8Array, name: string) => Promise<Examination>;
  readonly close: () => Promise<void>;
}

/** An examiner whose worker runs the module at `address`. */
export function examinerAt(address: URL, limits: Limits): Examiner {
  let worker: Worker | undefined;
  const stop = async (): Promise<void> => {
    const stopped = worker;
    worker = undefined;
    await stopped?.terminate();
  };
  return {
    examine: async (bytes, name) => {
      worker ??= start(address, limits);
      try {
        return examinationFrom(await answer(worker, { bytes, name }, limits));
      } catch (problem) {
        await stop();
        throw problem;
      }
    },
    close: stop,
  };
}

/** What libraries print while they work is kept from the report's output. */
function start(address: URL, { megabytes }: Limits): Worker {
  return new Worker(address, {
    resourceLimits: { maxOldGenerationSizeMb: megabytes },
    stdout: true,
    stderr: true,
  });
}

function answer(worker: Worker, request: Request, limits: Limits): Promise<Reply> {
  return new Promise((resolve, reject) => {
    const timer = setTimeout(() => settle(() => reject(new ReadError(tooLong(limits)))),
      limits.seconds * 1000);
    const onError = (problem: Error): void => settle(() => reject(explained(problem, limits)));
    const onExit = (): void => settle(() => reject(new Error('the worker ended unasked')));
    const onReply = (reply: Reply): void => settle(() => resolve(reply));
    const settle = (then: () => void): void => {
      clearTimeout(timer);
      worker.off('message', onReply).off('error', onError).off('exit', onExit);
      then();
    };
    worker.on('message', onReply).on('error', onError).on('exit', onExit);
    worker.postMessage(request);
  });
}

function tooLong({ seconds }: Limits): string {
  return `Reading took longer than ${seconds} seconds and was stopped. `
    + 'Allow more with --time-limit, or save the manuscript as PDF again and read that.';
}

function explained(problem: Error, { megabytes }: Limits): Error {
  if (!('code' in problem) || problem.code !== 'ERR_WORKER_OUT_OF_MEMORY') return problem;
  return new ReadError(`Reading needed more than ${megabytes} MB of memory and was stopped. `
    + 'Save the manuscript as PDF again, without pictures or supplements, and read that.');
}

function examinationFrom(reply: Reply): Examination {
  switch (reply.kind) {
    case 'examined': return reply.examination;
    case 'unreadable': throw new ReadError(reply.sentence);
    case 'fault': throw Object.assign(new Error(reply.message), { stack: reply.stack });
    default: return reply satisfies never;
  }
}
