import { useMemo } from 'react';
import type { Forecast, Scenario } from '#common/engine/index.ts';
import {
  groupCautions,
  HARM_CAUTION,
  STANDING_CAUTION,
  unsourcedFigures,
  type CautionGroup,
} from '../model/caution-groups.ts';

/** What to mind about this forecast, and what holds for every one. */
export function Cautions({ scenario, forecast }: { scenario: Scenario; forecast: Forecast | null }) {
  const groups = useMemo(() => groupCautions(forecast?.cautions ?? []), [forecast]);
  const unsourced = useMemo(() => unsourcedFigures(scenario), [scenario]);
  return (
    <section aria-label="Cautions" className="border-headroom-4 text-small space-y-2 border-l-3 py-0.5 pl-3">
      {groups.map((group) => (
        <Group key={group.code} group={group} />
      ))}
      {unsourced !== null && <p>{unsourced}</p>}
      <p>{STANDING_CAUTION}</p>
      <p className="text-muted">{HARM_CAUTION}</p>
    </section>
  );
}

function Group({ group }: { group: CautionGroup }) {
  const [first, ...others] = group.messages;
  return (
    <div>
      <p>{first}</p>
      {others.length > 0 && (
        <details>
          <summary className="text-muted hover:text-ink w-fit">
            {others.length === 1 ? 'One more of this kind' : `${others.length} more of this kind`}
          </summary>
          <ul className="mt-1 space-y-1">
            {others.map((message) => (
              <li key={message}>{message}</li>
            ))}
          </ul>
        </details>
      )}
    </div>
  );
}
