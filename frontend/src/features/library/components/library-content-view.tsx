import type { LibraryContent } from '#common/schemas/api/library.ts';
import { CellContent } from './cell-content.tsx';
import { ClimateContent } from './climate-content.tsx';
import { PartContent } from './part-content.tsx';

export function LibraryContentView({ content }: { content: LibraryContent }) {
  switch (content.kind) {
    case 'part':
      return <PartContent part={content.part} />;
    case 'cell':
      return <CellContent cell={content.cell} />;
    case 'climate':
      return <ClimateContent climate={content.climate} />;
  }
}
