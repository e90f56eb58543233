import type { LibraryKind } from '#common/schemas/api/library.ts';

export interface LibraryTab {
  tab: string;
  kind: LibraryKind;
  label: string;
  singular: string;
  plural: string;
}

export const LIBRARY_TABS: readonly LibraryTab[] = [
  { tab: 'parts', kind: 'part', label: 'Parts', singular: 'part', plural: 'parts' },
  { tab: 'cells', kind: 'cell', label: 'Cells', singular: 'cell', plural: 'cells' },
  { tab: 'climates', kind: 'climate', label: 'Climates', singular: 'climate', plural: 'climates' },
];

export function tabOf(kind: LibraryKind): LibraryTab | undefined {
  return LIBRARY_TABS.find((tab) => tab.kind === kind);
}
