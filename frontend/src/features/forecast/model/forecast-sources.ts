import { answerForecast, type ForecastReply } from './forecast-protocol.ts';
import type { ForecastSource, OpenForecastSource } from './live-forecast.ts';

/** Answers after the current task on this thread, for browsers without module workers. */
export const openOnThisThread: OpenForecastSource = (onReply) => {
  let timer: ReturnType<typeof setTimeout> | undefined;
  return {
    post(request) {
      timer = setTimeout(() => onReply(answerForecast(request)), 0);
    },
    stop: () => clearTimeout(timer),
  };
};

/** Longest computation that may stand between a keystroke and its frame, ms. */
const QUICK_MS = 12;

/**
 * Answers in place while that takes next to no time, so that the frame of a keystroke already shows the new answer, and in the
 * worker otherwise. The ledger, for which nobody waits, always comes from the worker.
 */
export const openQuickest: OpenForecastSource = (onReply, onFailure): ForecastSource => {
  let lastMs = Infinity;
  const worker = openForecastWorker((reply) => {
    if (reply.forecast?.ledger === null) lastMs = reply.computeMs;
    onReply(reply);
  }, onFailure);
  return {
    post(request) {
      if (request.withLedger || lastMs > QUICK_MS) return worker.post(request);
      const reply = answerForecast(request);
      lastMs = reply.computeMs;
      onReply(reply);
    },
    stop: () => worker.stop(),
  };
};

/** Answers in a module worker; without workers, on this thread. */
export const openForecastWorker: OpenForecastSource = (onReply, onFailure): ForecastSource => {
  if (typeof Worker === 'undefined') return openOnThisThread(onReply, onFailure);
  const worker = new Worker(new URL('./forecast.worker.ts', import.meta.url), { type: 'module' });
  worker.addEventListener('message', ({ data }: MessageEvent<ForecastReply>) => onReply(data));
  worker.addEventListener('error', onFailure);
  return { post: (request) => worker.postMessage(request), stop: () => worker.terminate() };
};
