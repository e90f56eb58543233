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

/** Answers in a module worker; without workers, on this thread. */
export const openForecastWorker: OpenForecastSource = (onReply, onFailure): ForecastSource => {
  if (typeof Worker === 'undefined') return openOnThisThread(onReply, onFailure);
  const worker = new Worker(new URL('./forecast.worker.ts', import.meta.url), { type: 'module' });
  worker.addEventListener('message', ({ data }: MessageEvent<ForecastReply>) => onReply(data));
  worker.addEventListener('error', onFailure);
  return { post: (request) => worker.postMessage(request), stop: () => worker.terminate() };
};
