import { describe, expect, it } from 'vitest';
import type { Forecast, Scenario } from '#common/engine/index.ts';
import { YEAR_S } from '#common/units/si.ts';
import { pictureForecast, pictureScenario } from '#test/support/picture-fixtures.ts';
import { forecastSentence, sentenceText } from './sentence.ts';

const told = (forecast: Partial<Forecast>, change?: (scenario: Scenario) => void): string =>
  sentenceText(forecastSentence(pictureScenario(change), pictureForecast(forecast))).replaceAll('\u00a0', ' ');

describe('forecastSentence', () => {
  it('forecastSentence: tells an undervoltage with month, part, step, limit, charge left and warning', () => {
    expect(told({})).toBe(
      'Lives 6.3 years with typical figures. It ends in February of its seventh winter, when the radio’s transmit step pulls ' +
        'the cell under 2.0 V, with 18 % of the charge left. The low-battery warning comes 41 days earlier.',
    );
  });

  it('forecastSentence: tells an undervoltage with less than a tenth left as an empty cell', () => {
    expect(told({ chargeLeftFraction: 0.04 })).toContain(
      'when the cell is empty: with 4 % of the charge left, the radio’s transmit step pulls the cell under 2.0 V.',
    );
  });

  it('forecastSentence: names the load at rest when rest is critical', () => {
    expect(told({ criticalStepId: 'rest', failingPartId: 'mcu' })).toContain(
      'when the load at rest pulls the cell under 2.0 V, the least that the controller needs, with 18 %',
    );
  });

  it('forecastSentence: names the regulator when it is the limit', () => {
    expect(told({ failingPartId: null, limitedBy: 'regulator' })).toContain(
      'when the transmit step pulls the cell under 2.0 V, below which its regulator stops, with',
    );
  });

  it('forecastSentence: quotes a step of several words and calls a part with a long name by its kind', () => {
    const text = told({}, (s) => {
      const [radio] = s.node.parts;
      const step = s.node.routines[0]?.steps[2];
      if (radio) radio.name = 'Transceiver 2.4 GHz, IEEE 802.15.4';
      if (step) step.name = 'Send the frame';
    });
    expect(text).toContain('when the radio’s step “Send the frame” pulls the cell under 2.0 V, with');
  });

  it('forecastSentence: says when the warning comes too late to be of use', () => {
    const warning = { timeS: 6.35 * YEAR_S, leadS: 0, falseAlarmTimesS: [], thresholdV: 2.4 };
    expect(told({ warning })).toContain('The low-battery warning comes only with the end.');
  });

  it('forecastSentence: tells an exhausted charge', () => {
    expect(
      told({
        outcome: 'charge-exhausted',
        chargeLeftFraction: 0,
        endMonth: 6,
        criticalStepId: 'rest',
        limitedBy: 'charge',
      }),
    ).toContain('It ends in June of its seventh year, when the cell is empty: with 0 % of the charge left.');
  });

  it('forecastSentence: tells charge that the cold keeps out of reach', () => {
    expect(told({ outcome: 'charge-exhausted', chargeLeftFraction: 0.22 })).toContain(
      'when the cell is empty at −8 °C: with 22 % of the charge out of reach.',
    );
  });

  it('forecastSentence: takes the depth at the coldest hour, where the cold leaves less to be had', () => {
    const text = told({ chargeLeftFraction: 0.57 }, (s) => {
      s.supply.cell.capacityFactorByTemperature = [
        [-20, 0.44],
        [-5, 0.44],
        [20, 1],
      ];
    });
    expect(text).toContain(
      'when the cell is empty at −8 °C: with 57 % of the charge out of reach, the radio’s transmit step pulls the cell under 2.0 V.',
    );
  });

  it('forecastSentence: tells a shelf life with its length', () => {
    const text = told(
      { outcome: 'shelf-life', lifeS: 10 * YEAR_S, endMonth: 9, chargeLeftFraction: 0.4, warning: null },
      (s) => {
        s.supply.cell.shelfLifeS = 10 * YEAR_S;
        delete s.supply.lowBattery;
      },
    );
    expect(text).toBe(
      'Lives 10 years with typical figures. It ends in September of its tenth year, when the cell reaches its shelf life of ' +
        '10 years, with 40 % of the charge left.',
    );
  });

  it('forecastSentence: tells a life past the horizon with the charge left', () => {
    const text = told({
      outcome: 'outlives-horizon',
      lifeS: null,
      endMonth: null,
      chargeLeftFraction: 0.31,
      warning: null,
    });
    expect(text).toContain('Lives longer than 40 years with typical figures: 31 % of the charge is left');
  });

  it('forecastSentence: says why a node never starts', () => {
    expect(told({ outcome: 'never-starts', lifeS: 0, endMonth: 10, chargeLeftFraction: 1, warning: null })).toBe(
      'Never starts with typical figures: in its first month, October, the radio’s transmit step pulls the cell under its ' +
        'limit, with 100 % of the charge left.',
    );
  });

  const oversubscribed: Partial<Forecast> = {
    outcome: 'oversubscribed',
    lifeS: null,
    endMonth: null,
    dekads: [],
    warning: null,
  };

  it('forecastSentence: says which routine needs more time than its period', () => {
    const text = told({ ...oversubscribed, chargeLeftFraction: 1 }, (s) => {
      const step = s.node.routines[0]?.steps[0];
      if (step) step.duration = { kind: 'fixed', typical: 1_200 };
    });
    expect(text).toContain('Oversubscribed with typical figures: report needs 20 min and comes every 15 min. No life');
    expect(text).toContain('100 % of the charge is left');
  });

  it('forecastSentence: says which part needs more time than there is', () => {
    const text = told(oversubscribed, (s) => {
      s.node.routines.forEach(({ steps: [step] }) => {
        if (step) step.duration = { kind: 'fixed', typical: 600 };
      });
      s.node.routines.forEach((routine) => (routine.schedule = { kind: 'every', periodS: 900 }));
    });
    expect(text).toContain('Oversubscribed with typical figures: controller needs 133 % of the time.');
  });

  it('forecastSentence: speaks of cells when the pack has several', () => {
    expect(told({}, (s) => void (s.supply.series = 2))).toContain('pulls the cells under 2.0 V');
  });

  it('forecastSentence: says so when a configured warning does not come', () => {
    expect(told({ warning: null })).toContain('The low-battery warning does not come before.');
  });

  it('forecastSentence: counts warnings that were cleared again', () => {
    const warning = { timeS: 6 * YEAR_S, leadS: 30 * 86_400, falseAlarmTimesS: [YEAR_S, 2 * YEAR_S], thresholdV: 2.4 };
    expect(told({ warning })).toContain('comes 30 days earlier, after 2 that were cleared again.');
  });

  it('forecastSentence: is no finer than half years when every driver is from memory', () => {
    const text = told({}, (s) => {
      const provenance = { kind: 'memory' } as const;
      s.supply.cell.capacityC.provenance = provenance;
      for (const { ohm } of s.supply.cell.resistanceOhm) ohm.provenance = provenance;
      for (const part of s.node.parts) for (const state of part.states) state.current.provenance = provenance;
    });
    expect(text).toContain('Lives 6.5 years with typical figures. It ends in its seventh winter, when');
  });

  it('forecastSentence: says "with typical figures" exactly once for each outcome', () => {
    const outcomes = [
      'charge-exhausted',
      'undervoltage',
      'shelf-life',
      'outlives-horizon',
      'never-starts',
      'oversubscribed',
    ] as const;
    for (const outcome of outcomes) expect(told({ outcome }).split('with typical figures')).toHaveLength(2);
  });
});
