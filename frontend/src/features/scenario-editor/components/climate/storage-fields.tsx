import { useDocument } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { CURRENT, STORAGE_TIME, TEMPERATURE } from '#frontend/features/scenario-editor/model/figure-options.ts';
import { updateClimate, withOptional } from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { FigureField } from '../fields/bound-fields.tsx';

/** How long, how warm and at which current a node lies before its life starts. */
export function StorageFields() {
  const storage = useDocument(({ climate }) => climate.storage);
  const field = 'climate.storage';
  return (
    <div className="grid grid-cols-2 gap-x-6 sm:grid-cols-4">
      <FigureField
        field={`${field}.durationS`}
        label="Stored for"
        hint="empty: not stored"
        value={storage?.durationS}
        options={STORAGE_TIME}
        isOptional
        change={(document, durationS) =>
          updateClimate(document, (climate) =>
            withOptional(
              climate,
              'storage',
              durationS === undefined
                ? undefined
                : { ...(climate.storage ?? { temperatureC: 20, currentA: 0 }), durationS },
            ),
          )
        }
      />
      {storage && (
        <>
          <FigureField
            field={`${field}.temperatureC`}
            label="At"
            editLabel="temperature in storage"
            value={storage.temperatureC}
            options={TEMPERATURE}
            change={(document, temperatureC = 20) =>
              updateClimate(document, (climate) =>
                climate.storage ? { ...climate, storage: { ...climate.storage, temperatureC } } : climate,
              )
            }
          />
          <FigureField
            field={`${field}.currentA`}
            label="Drawing"
            editLabel="current in storage"
            value={storage.currentA}
            options={CURRENT}
            change={(document, currentA = 0) =>
              updateClimate(document, (climate) =>
                climate.storage ? { ...climate, storage: { ...climate.storage, currentA } } : climate,
              )
            }
          />
        </>
      )}
    </div>
  );
}
