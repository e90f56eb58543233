import type { ExchangeDuration } from '#common/engine/scenario/scenario.types.ts';
import { useEditorStore, useIsReadOnly } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { STEP_TIME } from '#frontend/features/scenario-editor/model/figure-options.ts';
import { withOptional } from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { FigureField } from '../fields/bound-fields.tsx';
import type { ExchangeFieldsProps } from './loading-fields.tsx';

type Window = { delayS: number; openS: number };

const MOST_WINDOWS = 2;
const NEXT_WINDOW: readonly Window[] = [
  { delayS: 1, openS: 0.01 },
  { delayS: 2, openS: 0.01 },
];
const FIGURES = [
  { key: 'delayS', label: 'after', word: 'delay' },
  { key: 'openS', label: 'open for', word: 'opening' },
] as const;

/** Windows after a chirp frame in which an answer may come. */
export function ReceiveWindows({ field, stepName, exchange, change }: ExchangeFieldsProps) {
  const store = useEditorStore();
  const isReadOnly = useIsReadOnly();
  if (exchange.pattern !== 'chirp') return null;
  const windows = exchange.receiveWindows ?? [];
  const edit = (label: string, update: (before: Window[]) => Window[]): void =>
    store.edit({
      label: `${label} of ${stepName}`,
      change: (document) => change(document, (before) => withWindows(before, update)),
    });
  const next = NEXT_WINDOW[windows.length];
  return (
    <div className="col-span-full">
      {windows.map((window, index) => (
        <fieldset key={index} className="grid grid-cols-2 gap-x-6 sm:grid-cols-4">
          <legend className="sr-only">Receive window {index + 1}</legend>
          {FIGURES.map(({ key, label, word }) => (
            <FigureField
              key={key}
              field={`${field}.receiveWindows.${index}.${key}`}
              label={`Receive window ${index + 1}, ${label}`}
              editLabel={`${word} of receive window ${index + 1} of ${stepName}`}
              value={window[key]}
              options={STEP_TIME}
              change={(document, value) =>
                change(document, (before) =>
                  withWindows(before, (list) =>
                    value === undefined ? list : list.map((row, at) => (at === index ? { ...row, [key]: value } : row)),
                  ),
                )
              }
            />
          ))}
        </fieldset>
      ))}
      {!isReadOnly && (
        <p className="flex flex-wrap gap-x-5 text-small">
          {windows.length < MOST_WINDOWS && next && (
            <button
              type="button"
              className="link min-h-9"
              onClick={() => edit('receive window', (list) => [...list, next])}
            >
              Add a receive window
            </button>
          )}
          {windows.length > 0 && (
            <button
              type="button"
              className="link min-h-9"
              onClick={() => edit('receive window', (list) => list.slice(0, -1))}
            >
              Remove the last one
            </button>
          )}
        </p>
      )}
    </div>
  );
}

function withWindows(exchange: ExchangeDuration, update: (windows: Window[]) => Window[]): ExchangeDuration {
  if (exchange.pattern !== 'chirp') return exchange;
  const windows = update(exchange.receiveWindows ?? []);
  return withOptional(exchange, 'receiveWindows', windows.length === 0 ? undefined : windows);
}
