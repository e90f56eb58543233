import type { Target } from '#common/engine/scenario/scenario.types.ts';
import { useDocument } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { CONFIDENCE, LIFE } from '#frontend/features/scenario-editor/model/figure-options.ts';
import { updateTarget, withOptional } from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { FigureField } from '../fields/bound-fields.tsx';
import { ChoiceField } from '../fields/choice-field.tsx';
import { Section } from '../node/section.tsx';

const OUTAGES: readonly { value: NonNullable<Target['outages']>; label: string }[] = [
  { value: 'none', label: 'none: the first missed report is the end' },
  { value: 'tolerated', label: 'tolerated: the last possible report is the end' },
];

/** What life is wanted, how surely, and whether a winter's gap counts as the end. */
export function TargetEditor() {
  const target = useDocument((document) => document.target);
  return (
    <Section id="target" title="Target" note="what the forecast is held against">
      <div className="grid grid-cols-2 gap-x-6 sm:grid-cols-4">
        <FigureField
          field="target.lifeS"
          label="Wanted life"
          value={target.lifeS}
          options={LIFE}
          change={(document, lifeS) =>
            updateTarget(document, (before) => (lifeS === undefined ? before : { ...before, lifeS }))
          }
        />
        <FigureField
          field="target.confidence"
          label="Confidence"
          hint="share of nodes that must reach it"
          value={target.confidence}
          options={CONFIDENCE}
          change={(document, confidence) =>
            updateTarget(document, (before) => (confidence === undefined ? before : { ...before, confidence }))
          }
        />
        <div className="col-span-2">
          <ChoiceField
            field="target.outages"
            label="Outages in the cold"
            value={target.outages ?? 'none'}
            choices={OUTAGES}
            change={(document, outages) =>
              updateTarget(document, (before) =>
                withOptional(before, 'outages', outages === 'none' ? undefined : outages),
              )
            }
          />
        </div>
      </div>
    </Section>
  );
}
