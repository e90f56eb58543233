import { createContext, use, type ReactNode } from 'react';

export interface WhatIfTarget {
  routineId: string;
  stepId: string;
}

type Render = (target: WhatIfTarget) => ReactNode;

const WhatIfContext = createContext<Render | null>(null);

/** What stands beneath the pictures of an exchange: the page gives it, since features do not know each other. */
export function WhatIfProvider({ render, children }: { render: Render; children: ReactNode }) {
  return <WhatIfContext value={render}>{children}</WhatIfContext>;
}

/** The place for it; nothing where the page gives nothing. */
export function WhatIfSlot(target: WhatIfTarget): ReactNode {
  return use(WhatIfContext)?.(target) ?? null;
}
