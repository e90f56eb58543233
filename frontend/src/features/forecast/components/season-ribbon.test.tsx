import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import { pictureForecast, pictureScenario } from '#test/support/picture-fixtures.ts';
import { SeasonRibbon } from './season-ribbon.tsx';

afterEach(cleanup);

const renderRibbon = (): HTMLElement => {
  render(<SeasonRibbon scenario={pictureScenario()} forecast={pictureForecast()} />);
  return screen.getByRole('slider', { name: 'Month of life' });
};
const told = (slider: HTMLElement): string => (slider.getAttribute('aria-valuetext') ?? '').replaceAll('\u00a0', ' ');

describe('SeasonRibbon', () => {
  it('SeasonRibbon: tells the month of the end while none is pointed at', () => {
    expect(told(renderRibbon())).toMatch(
      /^February, year 7: no headroom, coldest −8 °C, 18 % of the charge left; end$/,
    );
  });

  it('SeasonRibbon: moves by months and years with the arrow keys and stops at both ends', () => {
    const slider = renderRibbon();
    fireEvent.keyDown(slider, { key: 'Home' });
    expect(told(slider)).toMatch(/^October, year 1/);
    fireEvent.keyDown(slider, { key: 'ArrowLeft' });
    expect(told(slider)).toMatch(/^October, year 1/);
    fireEvent.keyDown(slider, { key: 'ArrowRight' });
    expect(told(slider)).toMatch(/^November, year 1/);
    fireEvent.keyDown(slider, { key: 'ArrowDown' });
    expect(told(slider)).toMatch(/^November, year 2/);
    fireEvent.keyDown(slider, { key: 'End' });
    expect(told(slider)).toMatch(/^February, year 7/);
  });

  it('SeasonRibbon: has the same numbers as a table behind a disclosure', () => {
    renderRibbon();
    expect(screen.queryByRole('table')).toBeNull();
    const details = screen.getByText('The same numbers as a table').closest('details');
    if (!details) throw new Error('There is no disclosure.');
    details.open = true;
    fireEvent(details, new Event('toggle'));
    expect(screen.getAllByRole('row')).toHaveLength(1 + 77);
    expect(screen.getByRole('rowheader', { name: 'December, year 7 (warning)' })).toBeTruthy();
  });

  it('SeasonRibbon: explains its tints in volts', () => {
    renderRibbon();
    expect(screen.getByRole('img', { name: /0\.8 V and more.*under 0\.1 V/ })).toBeTruthy();
  });
});
