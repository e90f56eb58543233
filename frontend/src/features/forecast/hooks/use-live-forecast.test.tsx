import { act, cleanup, renderHook } from '@testing-library/react';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { Scenario } from '#common/engine/index.ts';
import { pictureForecast, pictureScenario } from '#test/support/picture-fixtures.ts';
import type { ForecastReply, ForecastRequest } from '../model/forecast-protocol.ts';
import { useLiveForecast } from './use-live-forecast.ts';

class StubWorker extends EventTarget {
  static made: StubWorker[] = [];
  readonly posted: ForecastRequest[] = [];
  isTerminated = false;

  constructor() {
    super();
    StubWorker.made.push(this);
  }

  postMessage(request: ForecastRequest): void {
    this.posted.push(request);
  }

  terminate(): void {
    this.isTerminated = true;
  }

  answer(): void {
    const id = this.posted.at(-1)?.id ?? 0;
    const data: ForecastReply = { id, forecast: pictureForecast(), problems: [], computeMs: 50 };
    this.dispatchEvent(new MessageEvent('message', { data }));
  }
}

beforeEach(() => {
  StubWorker.made = [];
  vi.stubGlobal('Worker', StubWorker);
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

describe('useLiveForecast', () => {
  it('useLiveForecast: computes each new document in one worker and hands out its forecast', () => {
    const first = pictureScenario();
    const { result, rerender } = renderHook((document: Scenario | null) => useLiveForecast(document), {
      initialProps: first,
    });
    expect(result.current).toMatchObject({ forecast: null, isComputing: true });
    act(() => StubWorker.made[0]?.answer());
    expect(result.current.forecast?.outcome).toBe('undervoltage');
    expect(result.current.scenario).toBe(first);
    rerender(pictureScenario((s) => (s.name = 'changed')));
    expect(StubWorker.made).toHaveLength(1);
    expect(StubWorker.made[0]?.posted.at(-1)?.document.name).toBe('changed');
  });

  it('useLiveForecast: asks for nothing without a document', () => {
    const { result } = renderHook(() => useLiveForecast(null));
    expect(StubWorker.made[0]?.posted).toEqual([]);
    expect(result.current).toEqual({ forecast: null, scenario: null, problems: [], isComputing: false });
  });

  it('useLiveForecast: ends its worker with the page', () => {
    const { unmount } = renderHook(() => useLiveForecast(pictureScenario()));
    unmount();
    expect(StubWorker.made[0]?.isTerminated).toBe(true);
  });
});
