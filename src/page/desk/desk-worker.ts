import type { DeskParts } from '../../deliver/desk-html.ts';
import type { DeskAnswer, DeskAsk, Stage } from './messages.ts';

export type DeskEnd = Exclude<DeskAnswer, { readonly say: 'stage' }>;

/** The worker as the page sees it: one question at a time, each with its end, and a way to stop at once. */
export interface DeskWorker {
  /** Null where it was stopped meanwhile. */
  ask(asked: DeskAsk, onStage?: (stage: Stage) => void): Promise<DeskEnd | null>;
  /** Ends the work and forgets every model; the next question starts a new worker. */
  stop(): void;
}

export function deskWorker(parts: DeskParts): DeskWorker {
  let worker: Worker | null = null;
  let release: () => void = () => undefined;
  const begun = (): Worker => {
    if (worker !== null) return worker;
    const url = URL.createObjectURL(new Blob([parts.worker], { type: 'text/javascript' }));
    worker = new Worker(url);
    URL.revokeObjectURL(url);
    const begin: DeskAsk = { ask: 'begin', parts: { ...parts, worker: '' } };
    worker.postMessage(begin);
    return worker;
  };
  return {
    ask(asked, onStage) {
      const at = begun();
      return new Promise((done) => {
        release = () => done(null);
        at.onmessage = ({ data }: MessageEvent<DeskAnswer>) => {
          if (data.say === 'stage') onStage?.(data.stage);
          else done(data);
        };
        // What is thrown outside of our own catching, such as a machine without the memory for the model.
        at.onerror = (event) => {
          event.preventDefault();
          done({ say: 'refused', message: event.message, fault: true });
        };
        at.postMessage(
          asked,
          asked.ask === 'check' ? asked.inputs.map(({ bytes }) => bytes.buffer as ArrayBuffer) : [],
        );
      });
    },
    stop() {
      worker?.terminate();
      worker = null;
      release();
    },
  };
}
