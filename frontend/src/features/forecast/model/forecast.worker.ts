import { answerForecast, type ForecastRequest } from './forecast-protocol.ts';

globalThis.addEventListener('message', ({ data }: MessageEvent<ForecastRequest>) => {
  globalThis.postMessage(answerForecast(data));
});
