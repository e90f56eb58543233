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

/** Longer texts show their first two lines until they are opened. */
const SHORT_LENGTH = 130;

export interface ProvenanceNoteProps {
  provenance: Provenance | null | undefined;
  /** What to say without provenance; a quantity without one counts as assumed. */
  otherwise?: string;
}

/** Where a figure comes from, with the source's words where there are any. */
export function ProvenanceNote({ provenance, otherwise = 'origin not stated' }: ProvenanceNoteProps) {
  if (!provenance) return <span className="text-small text-muted">{otherwise}</span>;
  const { text = '' } = provenance;
  if (text.length <= SHORT_LENGTH) return <Words provenance={provenance} />;
  return (
    <details className="group">
      <summary className="list-none">
        <span className="line-clamp-2 hover:underline hover:decoration-dotted hover:underline-offset-4 group-open:line-clamp-none">
          <Words provenance={provenance} />
        </span>
      </summary>
    </details>
  );
}

function Words({ provenance: { kind, text = '' } }: { provenance: Provenance }) {
  const isUnchecked = UNCHECKED.has(kind);
  return (
    <span className="text-small text-muted">
      <span className={isUnchecked ? 'font-semibold text-caution' : ''}>
        {isUnchecked && <span aria-hidden="true">◇ </span>}
        {WORDS[kind]}
      </span>
      {text !== '' && <span>: {text}</span>}
    </span>
  );
}
