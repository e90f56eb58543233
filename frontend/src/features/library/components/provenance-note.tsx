import type { Provenance } from '#common/engine/scenario/scenario.types.ts';

const WORDS: Record<Provenance['kind'], string> = {
  source: 'from a source',
  measured: 'measured',
  typical: 'typical',
  assumed: 'assumed',
  memory: 'from memory',
};

/** Figures that nobody has checked stand out by a mark and their words, not by colour alone. */
const UNCHECKED = new Set<Provenance['kind']>(['memory', 'assumed']);

export interface ProvenanceNoteProps {
  provenance: Provenance | null | undefined;
  /** What to say without provenance; a quantity without one counts as assumed. */
  otherwise?: string;
}

/** Where a figure comes from, with the source's words where there are any. */
export function ProvenanceNote({ provenance, otherwise = 'origin not stated' }: ProvenanceNoteProps) {
  if (!provenance) return <span className="text-small text-muted">{otherwise}</span>;
  const isUnchecked = UNCHECKED.has(provenance.kind);
  return (
    <span className="block text-small text-muted">
      <span className={isUnchecked ? 'font-semibold text-caution' : ''}>
        {isUnchecked && <span aria-hidden="true">◇ </span>}
        {WORDS[provenance.kind]}
      </span>
      {provenance.text !== undefined && provenance.text !== '' && <span>: {provenance.text}</span>}
    </span>
  );
}
