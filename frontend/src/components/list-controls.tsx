import type { ListParams, SetListParams } from '#frontend/hooks/use-list-params.ts';
import { SearchField } from './search-field.tsx';
import { Segmented } from './segmented.tsx';

const ARCHIVE = [
  { value: 'false', label: 'In use' },
  { value: 'true', label: 'Archived' },
] as const;

export interface ListControlsProps {
  searchLabel: string;
  /** Says what is filtered, such as "Projects shown". */
  filterLabel: string;
  params: ListParams;
  onChange: SetListParams;
}

/** Search and archive filter above a list. */
export function ListControls({ searchLabel, filterLabel, params, onChange }: ListControlsProps) {
  return (
    <div className="flex flex-wrap items-center justify-between gap-x-8 gap-y-2">
      <SearchField label={searchLabel} value={params.q} onChange={(q) => onChange({ q })} />
      <Segmented
        label={filterLabel}
        value={params.archived === 'true' ? 'true' : 'false'}
        options={ARCHIVE}
        onChange={(archived) => onChange({ archived })}
      />
    </div>
  );
}
