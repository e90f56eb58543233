import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { pictureForecast, pictureScenario } from '#test/support/picture-fixtures.ts';
import type { ForecastReply, ForecastRequest } from './forecast-protocol.ts';
import { openQuickest } from './forecast-sources.ts';

class StubWorker extends EventTarget {
  static last: StubWorker;
  readonly posted: ForecastRequest[] = [];

  constructor() {
    super();
    StubWorker.last = this;
  }

  postMessage(request: ForecastRequest): void {
    this.posted.push(request);
  }

  terminate(): void {
    this.posted.length = 0;
  }

  answer(computeMs: number): void {
    const data: ForecastReply = { id: 1, forecast: pictureForecast({ ledger: null }), problems: [], computeMs };
    this.dispatchEvent(new MessageEvent('message', { data }));
  }
}

const request = (id: number, withLedger = false): ForecastRequest => ({ id, document: pictureScenario(), withLedger });
let replies: ForecastReply[];
let clockMs: number;
let stepMs: number;
beforeEach(() => {
  replies = [];
  clockMs = 0;
  stepMs = 0;
  vi.stubGlobal('Worker', StubWorker);
  vi.spyOn(performance, 'now').mockImplementation(() => (clockMs += stepMs));
});
afterEach(() => {
  vi.restoreAllMocks();
  vi.unstubAllGlobals();
});
const open = () =>
  openQuickest(
    (reply) => replies.push(reply),
    () => undefined,
  );

describe('openQuickest', () => {
  it('openQuickest: asks the worker while it is not known how long an answer takes', () => {
    open().post(request(1));
    expect(replies).toEqual([]);
    expect(StubWorker.last.posted).toHaveLength(1);
  });

  it('openQuickest: answers within the call once the worker was quick', () => {
    const source = open();
    source.post(request(1));
    StubWorker.last.answer(1);
    source.post(request(2));
    expect(replies.map(({ id }) => id)).toEqual([1, 2]);
    expect(StubWorker.last.posted).toHaveLength(1);
  });

  it('openQuickest: goes on asking a worker that takes long', () => {
    const source = open();
    source.post(request(1));
    StubWorker.last.answer(40);
    source.post(request(2));
    expect(StubWorker.last.posted).toHaveLength(2);
  });

  it('openQuickest: goes back to the worker after an answer in place that took long', () => {
    const source = open();
    source.post(request(1));
    StubWorker.last.answer(1);
    stepMs = 40;
    source.post(request(2));
    source.post(request(3));
    expect(StubWorker.last.posted.map(({ id }) => id)).toEqual([1, 3]);
  });

  it('openQuickest: leaves the ledger to the worker, however quick answers are', () => {
    const source = open();
    source.post(request(1));
    StubWorker.last.answer(1);
    source.post(request(2, true));
    expect(StubWorker.last.posted.map(({ withLedger }) => withLedger)).toEqual([false, true]);
  });
});
