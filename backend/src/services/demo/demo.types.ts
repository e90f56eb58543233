import type { Scenario } from '#common/engine/scenario/scenario.types.ts';

/** One of the demo's four accounts, `<name>@tarnfold.example`. */
export type DemoAccount = 'owner' | 'engineer' | 'sales' | 'viewer';

/** A saved state of a demo scenario; the first of a list is revision 1. */
export interface DemoRevision {
  note: string;
  author: DemoAccount;
  document: Scenario;
}

/** A demo scenario; its name is the name in its latest document. */
export interface DemoScenario {
  revisions: readonly [DemoRevision, ...DemoRevision[]];
}

export interface DemoProject {
  name: string;
  description: string;
  scenarios: readonly DemoScenario[];
}

/** The demo workspace as data; figures are invented and say so. */
export interface DemoWorkspace {
  name: string;
  projects: readonly DemoProject[];
}
