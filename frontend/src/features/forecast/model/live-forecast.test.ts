import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { Scenario } from '#common/engine/index.ts';
import { pictureForecast, pictureScenario } from '#test/support/picture-fixtures.ts';
import type { ForecastReply, ForecastRequest } from './forecast-protocol.ts';
import { LiveForecast, type LiveForecastState, type OpenForecastSource } from './live-forecast.ts';

class FakeWorker {
  readonly posted: ForecastRequest[] = [];
  isStopped = false;
  fail: () => void = () => undefined;
  private reply: (reply: ForecastReply) => void = () => undefined;

  readonly open: OpenForecastSource = (onReply, onFailure) => {
    this.reply = onReply;
    this.fail = onFailure;
    return { post: (request) => this.posted.push(request), stop: () => (this.isStopped = true) };
  };

  /** Answers the last request with a forecast, or with a problem. */
  answer(problem?: string): void {
    const request = this.posted.at(-1);
    if (!request) throw new Error('Nothing was asked.');
    const problems = problem === undefined ? [] : [{ path: 'node.parts[0]', message: problem }];
    const ledger = request.withLedger ? pictureForecast().ledger : null;
    this.reply({
      id: request.id,
      forecast: problem === undefined ? pictureForecast({ ledger }) : null,
      problems,
      computeMs: 1,
    });
  }

  answerOld(id: number): void {
    this.reply({ id, forecast: pictureForecast(), problems: [], computeMs: 1 });
  }
}

const named = (name: string): Scenario => pictureScenario((scenario) => (scenario.name = name));
let worker: FakeWorker;
let fallback: FakeWorker;
let states: LiveForecastState[];
let live: LiveForecast;
const state = (): LiveForecastState | undefined => states.at(-1);

beforeEach(() => {
  vi.useFakeTimers();
  worker = new FakeWorker();
  fallback = new FakeWorker();
  states = [];
  live = new LiveForecast(worker.open, fallback.open, (next) => states.push(next));
});
afterEach(() => {
  live.stop();
  vi.useRealTimers();
});

describe('LiveForecast', () => {
  it('LiveForecast: asks without the ledger first and for the ledger once typing pauses', () => {
    live.submit(named('a'));
    worker.answer();
    expect(worker.posted.map((request) => request.withLedger)).toEqual([false]);
    expect(state()?.forecast?.ledger).toBeNull();
    vi.runAllTimers();
    expect(worker.posted.map((request) => request.withLedger)).toEqual([false, true]);
    worker.answer();
    expect(state()?.forecast?.ledger).not.toBeNull();
  });

  it('LiveForecast: keeps only the newest document waiting while one is computed', () => {
    for (const name of ['a', 'b', 'c', 'd']) live.submit(named(name));
    expect(worker.posted.map((request) => request.document.name)).toEqual(['a']);
    worker.answer();
    expect(worker.posted.map((request) => request.document.name)).toEqual(['a', 'd']);
  });

  it('LiveForecast: asks for no ledger of a document that is no longer the newest', () => {
    live.submit(named('a'));
    worker.answer();
    live.submit(named('b'));
    vi.runAllTimers();
    expect(worker.posted.map((request) => request.withLedger)).toEqual([false, false]);
  });

  it('LiveForecast: ignores an answer to a request that is not under way', () => {
    live.submit(named('a'));
    worker.answerOld(77);
    expect(state()?.forecast).toBeNull();
  });

  it('LiveForecast: is computing from the change to its answer', () => {
    live.submit(named('a'));
    expect(state()?.isComputing).toBe(true);
    worker.answer();
    expect(state()?.isComputing).toBe(false);
  });

  it('LiveForecast: keeps the last good forecast and its document while the input has problems', () => {
    live.submit(named('good'));
    worker.answer();
    const good = state()?.forecast;
    live.submit(named('bad'));
    worker.answer('No way there.');
    expect(state()?.problems).toEqual([{ path: 'node.parts[0]', message: 'No way there.' }]);
    expect(state()?.forecast).toBe(good);
    expect(state()?.scenario?.name).toBe('good');
  });

  it('LiveForecast: clears the problems once the input is good again', () => {
    live.submit(named('bad'));
    worker.answer('No way there.');
    live.submit(named('good'));
    worker.answer();
    expect(state()?.problems).toEqual([]);
    expect(state()?.scenario?.name).toBe('good');
  });

  it('LiveForecast: keeps the forecast when the document is withdrawn', () => {
    live.submit(named('a'));
    worker.answer();
    live.submit(null);
    expect(state()?.scenario?.name).toBe('a');
  });

  it('LiveForecast: repeats the request on this thread when the worker fails', () => {
    live.submit(named('a'));
    worker.fail();
    expect(worker.isStopped).toBe(true);
    expect(fallback.posted.map((request) => request.document.name)).toEqual(['a']);
    fallback.answer();
    expect(state()?.forecast).not.toBeNull();
  });

  it('LiveForecast: tells nothing after it was stopped', () => {
    live.submit(named('a'));
    const count = states.length;
    live.stop();
    worker.answer();
    expect(states).toHaveLength(count);
    expect(worker.isStopped).toBe(true);
  });
});
