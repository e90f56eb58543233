import { cleanup, fireEvent, render, screen, within } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { pictureForecast, pictureScenario } from '#test/support/picture-fixtures.ts';
import { ForecastSentence } from './forecast-sentence.tsx';

afterEach(cleanup);

describe('ForecastSentence', () => {
  it('ForecastSentence: opens where a figure comes from, and closes it again', () => {
    const handleOpen = vi.fn();
    render(<ForecastSentence scenario={pictureScenario()} forecast={pictureForecast()} onOpen={handleOpen} />);
    const life = screen.getByRole('button', { name: /6\.3.years/ });
    expect(life.getAttribute('aria-expanded')).toBe('false');
    fireEvent.click(life);
    const panel = screen.getByRole('region', { name: /The life/ });
    expect(within(panel).getByText('Starting charge')).toBeTruthy();
    expect(life.getAttribute('aria-controls')).toBe(panel.id);
    fireEvent.click(within(panel).getByRole('button', { name: 'Close' }));
    expect(screen.queryByRole('region')).toBeNull();
    expect(handleOpen.mock.calls).toEqual([['life'], [null]]);
  });

  it('ForecastSentence: opens a figure by Enter and by Space', () => {
    render(<ForecastSentence scenario={pictureScenario()} forecast={pictureForecast()} />);
    fireEvent.keyDown(screen.getByRole('button', { name: /2\.0.V/ }), { key: 'Enter' });
    expect(screen.getByRole('region', { name: /voltage that ends it/ })).toBeTruthy();
    fireEvent.keyDown(screen.getByRole('button', { name: /41.days/ }), { key: ' ' });
    expect(screen.getByRole('region', { name: /low-battery warning/ })).toBeTruthy();
  });

  it('ForecastSentence: shows figures of the life that add up', () => {
    render(<ForecastSentence scenario={pictureScenario()} forecast={pictureForecast()} />);
    fireEvent.click(screen.getByRole('button', { name: /18/ }));
    const panel = within(screen.getByRole('region'));
    const valueOf = (label: string): number =>
      Number.parseFloat(panel.getByText(label).parentElement?.querySelector('dd')?.textContent ?? '');
    const left = valueOf('Starting charge') - valueOf('Drawn by the node') - valueOf('Lost by self-discharge');
    expect(left).toBe(valueOf('Left at the end'));
    expect(left).toBe(180);
  });

  it('ForecastSentence: closes an explanation whose figure the sentence no longer has', () => {
    const { rerender } = render(<ForecastSentence scenario={pictureScenario()} forecast={pictureForecast()} />);
    fireEvent.click(screen.getByRole('button', { name: /2\.0.V/ }));
    rerender(<ForecastSentence scenario={pictureScenario()} forecast={pictureForecast({ outcome: 'shelf-life' })} />);
    expect(screen.queryByRole('region')).toBeNull();
  });
});
