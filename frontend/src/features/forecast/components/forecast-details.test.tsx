import { cleanup, fireEvent, render, screen, within } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import { pictureForecast, pictureScenario } from '#test/support/picture-fixtures.ts';
import { ForecastDetails } from './forecast-details.tsx';

afterEach(cleanup);

const renderDetails = (forecast = pictureForecast()): ReturnType<typeof render> =>
  render(<ForecastDetails scenario={pictureScenario()} forecast={forecast} />);

describe('ForecastDetails', () => {
  it('ForecastDetails: opens a line of the ledger to its entries and closes it', () => {
    renderDetails();
    const rest = screen.getByRole('button', { name: 'Rest, all parts' });
    expect(screen.queryByRole('rowheader', { name: /^Radio.*rest: Sleep/ })).toBeNull();
    fireEvent.click(rest);
    expect(screen.getByRole('rowheader', { name: /^Radio.*rest: Sleep/ })).toBeTruthy();
    fireEvent.click(rest);
    expect(screen.queryByRole('rowheader', { name: /^Radio.*rest: Sleep/ })).toBeNull();
  });

  it('ForecastDetails: shows what the largest line is made of at once', () => {
    renderDetails();
    expect(screen.getByRole('button', { name: 'Report' }).getAttribute('aria-expanded')).toBe('true');
    expect(screen.getAllByRole('rowheader', { name: /^Sense/ }).length).toBeGreaterThan(1);
  });

  it('ForecastDetails: keeps the last ledger until the next one is there', () => {
    const { rerender } = renderDetails();
    rerender(<ForecastDetails scenario={pictureScenario()} forecast={pictureForecast({ ledger: null })} />);
    expect(screen.getByRole('button', { name: 'Rest, all parts' })).toBeTruthy();
  });

  it('ForecastDetails: tells the exact total with every digit', () => {
    renderDetails();
    expect(screen.getByText(/448\.079440000000000000000000000001 C in a mean year/)).toBeTruthy();
  });

  it('ForecastDetails: reads the curves out by arrow keys, all at the same time', () => {
    renderDetails();
    const charge = screen.getByRole('slider', { name: 'Charge left over life' });
    const voltage = screen.getByRole('slider', { name: 'Voltage over life' });
    fireEvent.keyDown(charge, { key: 'Home' });
    expect(charge.getAttribute('aria-valuetext')).toMatch(/^early October, year 1: charge left/);
    expect(voltage.getAttribute('aria-valuetext')).toMatch(/^early October, year 1: open circuit .*, loaded .*, limit/);
  });

  it('ForecastDetails: has the numbers of each curve as a table with units', () => {
    renderDetails();
    const details = screen.getByText('Voltage as a table').closest('details');
    if (!details) throw new Error('There is no disclosure.');
    details.open = true;
    fireEvent(details, new Event('toggle'));
    const table = within(details).getByRole('table');
    expect(
      within(table)
        .getAllByRole('columnheader')
        .map((cell) => cell.textContent),
    ).toEqual(['Third of a month', 'open circuit, V', 'loaded, V', 'limit, V']);
    expect(within(table).getAllByRole('row')).toHaveLength(1 + pictureForecast().dekads.length);
  });

  it('ForecastDetails: says where a voltage axis begins', () => {
    renderDetails();
    expect(screen.getByText(/axis begins at 1\.8/)).toBeTruthy();
  });

  it('ForecastDetails: lists share, current and charge a day of each part and state', () => {
    renderDetails();
    const table = within(screen.getByRole('group', { name: /How long each part/ })).getByRole('table');
    expect(within(table).getByRole('row', { name: /Controller Sleep 99\.998.% 1\.1.µA 0\.0264.mAh/ })).toBeTruthy();
    expect(within(table).getByRole('row', { name: /Sleep → Active/ })).toBeTruthy();
  });
});
