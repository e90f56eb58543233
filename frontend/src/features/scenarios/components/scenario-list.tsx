import { Link } from 'react-router-dom';
import type { ScenarioSummary } from '#common/schemas/api/scenarios.ts';
import { DataTable, type Column } from '#frontend/components/data-table.tsx';
import type { MenuItem } from '#frontend/components/menu.tsx';
import { RowMenu } from '#frontend/components/row-menu.tsx';
import { When } from '#frontend/components/when.tsx';
import { useScenarioActs, type ScenarioActs } from '../hooks/use-scenario-acts.ts';
import { ForecastShort } from './forecast-short.tsx';
import { LifeLine, lifeScaleYears } from './life-line.tsx';

export interface ScenarioListProps {
  scenarios: readonly ScenarioSummary[];
  canEdit: boolean;
  sort: string;
  onSort: (sort: string) => void;
}

export function ScenarioList({ scenarios, canEdit, sort, onSort }: ScenarioListProps) {
  const acts = useScenarioActs();
  return (
    <DataTable
      caption="Scenarios"
      columns={columns({ canEdit, acts, scaleYears: lifeScaleYears(scenarios.map(({ forecast }) => forecast)) })}
      rows={scenarios}
      rowKey={(scenario) => scenario.id}
      sort={sort}
      onSort={onSort}
    />
  );
}

interface ColumnOptions {
  canEdit: boolean;
  acts: ScenarioActs;
  scaleYears: number;
}

function columns({ canEdit, acts, scaleYears }: ColumnOptions): Column<ScenarioSummary>[] {
  return [
    { key: 'name', header: 'Scenario', sortBy: 'name', cell: (scenario) => <ScenarioName scenario={scenario} /> },
    {
      key: 'forecast',
      header: 'Forecast, with typical figures',
      sortBy: 'life',
      sortsDescendingFirst: true,
      from: 'md',
      className: 'md:w-[22rem]',
      cell: (scenario) => <ForecastShort forecast={scenario.forecast} />,
    },
    {
      key: 'line',
      header: `Life and target, 0 to ${scaleYears} years`,
      from: 'lg',
      className: 'w-64',
      cell: (scenario) => <LifeLine forecast={scenario.forecast} scaleYears={scaleYears} />,
    },
    {
      key: 'updated',
      header: 'Last change',
      sortBy: 'updatedAt',
      sortsDescendingFirst: true,
      from: 'sm',
      className: 'w-44 text-muted',
      cell: (scenario) => <LastChange scenario={scenario} />,
    },
    {
      key: 'acts',
      header: 'Actions',
      isHeaderHidden: true,
      className: 'w-10 text-right',
      cell: (scenario) => <RowMenu name={scenario.name} items={menuItems(scenario, canEdit, acts)} />,
    },
  ];
}

function menuItems(scenario: ScenarioSummary, canEdit: boolean, acts: ScenarioActs): MenuItem[] {
  const exportItem = { key: 'export', label: 'Export as a file', onSelect: () => acts.exportFile(scenario) };
  if (!canEdit) return [exportItem];
  return [
    { key: 'duplicate', label: 'Duplicate', onSelect: () => acts.duplicate(scenario) },
    exportItem,
    scenario.archivedAt === null
      ? { key: 'archive', label: 'Archive', onSelect: () => acts.archive(scenario, true) }
      : { key: 'restore', label: 'Take out of the archive', onSelect: () => acts.archive(scenario, false) },
  ];
}

function ScenarioName({ scenario }: { scenario: ScenarioSummary }) {
  return (
    <>
      <Link
        to={`/scenarios/${scenario.id}`}
        className="text-lg font-semibold hover:text-accent hover:underline hover:underline-offset-4"
      >
        {scenario.name}
      </Link>
      <span className="mt-1 block md:hidden">
        <ForecastShort forecast={scenario.forecast} />
      </span>
      <span className="mt-1 block text-small text-muted sm:hidden">
        <LastChange scenario={scenario} isInline />
      </span>
    </>
  );
}

function LastChange({ scenario, isInline = false }: { scenario: ScenarioSummary; isInline?: boolean }) {
  return (
    <>
      <When iso={scenario.updatedAt} />
      <span className={isInline ? '' : 'block text-small'}>
        {isInline ? ', ' : ''}revision {scenario.revision}, {scenario.updatedBy}
      </span>
    </>
  );
}
