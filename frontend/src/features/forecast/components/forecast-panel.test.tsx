import { cleanup, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import { pictureForecast, pictureScenario } from '#test/support/picture-fixtures.ts';
import { ForecastPanel } from './forecast-panel.tsx';

afterEach(cleanup);

const problems = [{ path: 'node.parts[0].states[0].current', message: 'Type a current.' }];

describe('ForecastPanel', () => {
  it('ForecastPanel: shows sentence, ribbon, facts and cautions', () => {
    render(
      <ForecastPanel scenario={pictureScenario()} forecast={pictureForecast()} problems={[]} isComputing={false} />,
    );
    expect(screen.getByRole('heading', { name: 'Forecast' })).toBeTruthy();
    expect(screen.getByText(/It ends in/)).toBeTruthy();
    expect(screen.getByRole('slider')).toBeTruthy();
    expect(screen.getByText('Heaviest pulse')).toBeTruthy();
    expect(screen.getByText(/An estimate is no guarantee/)).toBeTruthy();
    expect(screen.getByText(/local codes and licensed practice decide/)).toBeTruthy();
  });

  it('ForecastPanel: says that a shown forecast is of the last complete input while the present one has problems', () => {
    render(
      <ForecastPanel
        scenario={pictureScenario()}
        forecast={pictureForecast()}
        problems={problems}
        isComputing={false}
      />,
    );
    expect(screen.getByRole('status').textContent).toBe('Of the last complete input. One entry needs another look.');
    expect(screen.getByText(/It ends in/)).toBeTruthy();
  });

  it('ForecastPanel: lists the problems while there is no forecast at all', () => {
    render(<ForecastPanel scenario={pictureScenario()} forecast={null} problems={problems} isComputing={false} />);
    expect(screen.getByText('One entry needs another look.')).toBeTruthy();
    expect(screen.getByText('Type a current.')).toBeTruthy();
  });

  it('ForecastPanel: asks for a part where there is none', () => {
    const scenario = pictureScenario((s) => {
      s.node.parts = [];
      s.node.routines = [];
    });
    render(<ForecastPanel scenario={scenario} forecast={null} problems={[]} isComputing={false} />);
    expect(screen.getByText('Add the first part.')).toBeTruthy();
  });

  it('ForecastPanel: asks for a routine where the node only rests', () => {
    const scenario = pictureScenario((s) => (s.node.routines = []));
    render(<ForecastPanel scenario={scenario} forecast={null} problems={[]} isComputing={false} />);
    expect(screen.getByText('Add a routine.')).toBeTruthy();
  });

  it('ForecastPanel: groups cautions of one kind and counts the others', () => {
    const cautions = [1, 2, 3].map((n) => ({
      code: 'instant-moves',
      message: `Part ${n} moves in no time.`,
      path: '',
    }));
    render(
      <ForecastPanel
        scenario={pictureScenario()}
        forecast={pictureForecast({ cautions })}
        problems={[]}
        isComputing={false}
      />,
    );
    expect(screen.getByText('Part 1 moves in no time.')).toBeTruthy();
    expect(screen.getByText('2 more of this kind')).toBeTruthy();
  });
});
