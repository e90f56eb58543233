import { useState } from 'react';
import { linkOf } from '#common/engine/link/link-of.ts';
import type { LinkSettings, Scenario } from '#common/engine/scenario/scenario.types.ts';
import { useCautions } from '#frontend/features/scenario-editor/hooks/caution-context.tsx';
import {
  useEditorStore,
  useIsReadOnly,
  useProblems,
} from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import {
  LINK_SECTIONS,
  NEW_PULLING,
  PULLING_FIELDS,
  type LinkSection,
  type LinkSectionId,
} from '#frontend/features/scenario-editor/model/link/link-fields.table.ts';
import { valueAt, withValueAt } from '#frontend/features/scenario-editor/model/link/link-values.ts';
import {
  CUSTOM_PHY_FIELDS,
  PHY_CHOICES,
  phyChoiceOf,
  phyOfChoice,
  phyWords,
  type PhyChoice,
} from '#frontend/features/scenario-editor/model/link/phy-choice.ts';
import { ChoiceField } from '../fields/choice-field.tsx';
import { DescriptorField, type FieldHolder } from './descriptor-field.tsx';

export interface LinkFieldsProps {
  /** Field key of the settings: `node.link`, or the `link` of a step's duration. */
  path: string;
  /** Whose settings they are, for undo and labels: "the node", or the name of the step. */
  of: string;
  settings: LinkSettings;
  /** Settings of the node, which hold where a step says nothing; null for those of the node itself. */
  inherited: LinkSettings | null;
  change: (document: Scenario, apply: (link: LinkSettings) => LinkSettings) => Scenario;
  /** Sections to show; default: all. */
  sections?: readonly LinkSectionId[];
}

/** Link settings of the node or of a step, in sections whose headings tell what holds now. */
export function LinkFields({ sections, ...props }: LinkFieldsProps) {
  const effective = linkOf(props.inherited ?? {}, props.settings);
  const holder: FieldHolder = {
    path: props.path,
    of: props.of,
    values: props.settings,
    inherited: props.inherited,
    write: (document, key, update) =>
      props.change(document, (link) => withValueAt(link, key, update(valueAt(link, key)))),
  };
  return (
    <div className="border-t border-hair">
      {LINK_SECTIONS.filter(({ id }) => sections?.includes(id) ?? true).map((section) => (
        <SectionFields key={section.id} section={section} effective={effective} holder={holder} {...props} />
      ))}
    </div>
  );
}

interface SectionProps extends Omit<LinkFieldsProps, 'sections'> {
  section: LinkSection;
  effective: LinkSettings;
  holder: FieldHolder;
}

function SectionFields({ section, effective, holder, ...props }: SectionProps) {
  const { id, title, fields, summary } = section;
  const mark = useMark(holder, section);
  const [isOpen, setOpen] = useState(id === 'phy' && effective.phy === undefined);
  const isOwn = holder.inherited !== null && ownKeys(section).some((key) => valueAt(holder.values, key) !== undefined);
  return (
    <details
      open={isOpen}
      onToggle={(event) => setOpen(event.currentTarget.open)}
      className="group/link border-b border-hair"
    >
      <summary className="flex min-h-10 list-none flex-wrap items-baseline gap-x-3 py-2 hover:text-accent [&::-webkit-details-marker]:hidden">
        <span className="w-56 shrink-0 font-semibold">
          <span aria-hidden="true" className="mr-1.5 inline-block w-3 text-muted">
            {isOpen ? '−' : '+'}
          </span>
          {title}
        </span>
        <span className="min-w-0 flex-1 text-small text-muted max-sm:basis-full max-sm:pl-[1.125rem]">
          {summary(effective)
            .filter((words) => words !== undefined)
            .join(' · ')}
          {isOwn && <strong className="ml-2 font-semibold text-ink">of this step</strong>}
          {mark !== null && <strong className={`ml-2 font-semibold ${mark.className}`}>{mark.word}</strong>}
        </span>
      </summary>
      {isOpen && (
        <div className="grid grid-cols-2 gap-x-6 pt-1 pb-2 sm:grid-cols-3 sm:pl-[1.125rem] xl:grid-cols-4">
          {id === 'phy' && <PhyFields {...props} holder={holder} />}
          {fields.map((descriptor) => (
            <DescriptorField key={descriptor.key} descriptor={descriptor} holder={holder} />
          ))}
          {id === 'crystal' && <Pulling {...props} holder={holder} />}
        </div>
      )}
    </details>
  );
}

const ownKeys = ({ id, fields }: LinkSection): string[] => [
  ...fields.map(({ key }) => key),
  ...(id === 'phy' ? ['phy'] : id === 'crystal' ? ['crystal.pulling'] : []),
];

/** That something in a closed section wants attention. */
function useMark({ path }: FieldHolder, section: LinkSection): { word: string; className: string } | null {
  const problems = useProblems();
  const cautions = useCautions();
  const keys = ownKeys(section).map((key) => `${path}.${key}`);
  const touches = (fields: ReadonlyMap<string, string>): boolean =>
    [...fields.keys()].some((field) => keys.some((key) => field === key || field.startsWith(`${key}.`)));
  if (touches(problems)) return { word: 'something is wrong', className: 'text-rust' };
  return touches(cautions) ? { word: 'note', className: 'text-caution' } : null;
}

function PhyFields({
  path,
  of,
  settings,
  inherited,
  change,
  holder,
}: Omit<LinkFieldsProps, 'sections'> & { holder: FieldHolder }) {
  const none = inherited?.phy === undefined ? 'none chosen' : `as the node: ${phyWords(inherited.phy)}`;
  return (
    <>
      <div className="col-span-2">
        <ChoiceField<PhyChoice>
          field={`${path}.phy`}
          label="PHY"
          editLabel={`PHY of ${of}`}
          value={phyChoiceOf(settings.phy)}
          choices={[{ value: '', label: none }, ...PHY_CHOICES]}
          change={(document, choice) =>
            change(document, (link) => withValueAt(link, 'phy', phyOfChoice(choice, link.phy ?? inherited?.phy)))
          }
        />
      </div>
      {typeof settings.phy === 'object' &&
        CUSTOM_PHY_FIELDS.map((descriptor) => (
          <DescriptorField key={descriptor.key} descriptor={descriptor} holder={{ ...holder, inherited: null }} />
        ))}
    </>
  );
}

/** The load on the crystal counts as a whole or not at all. */
function Pulling({ of, settings, change, holder }: Omit<LinkFieldsProps, 'sections'> & { holder: FieldHolder }) {
  const store = useEditorStore();
  const isReadOnly = useIsReadOnly();
  const isThere = settings.crystal?.pulling !== undefined;
  const toggle = (): void =>
    store.edit({
      label: `load on the crystal of ${of}`,
      change: (document) =>
        change(document, (link) => withValueAt(link, 'crystal.pulling', isThere ? undefined : NEW_PULLING)),
    });
  return (
    <>
      {!isReadOnly && (
        <div className="col-span-full">
          <button type="button" className="link min-h-9 text-small" onClick={toggle}>
            {isThere ? 'Do not count the load on the crystal' : 'Count the load on the crystal'}
          </button>
        </div>
      )}
      {isThere &&
        PULLING_FIELDS.map((descriptor) => (
          <DescriptorField key={descriptor.key} descriptor={descriptor} holder={{ ...holder, inherited: null }} />
        ))}
    </>
  );
}
