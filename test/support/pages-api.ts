import type { Page } from 'playwright-core';
import type { Scenario } from '#common/engine/index.ts';

/** GETs from the API with the session of a page, as JSON. */
export async function getJson(page: Page, path: string): Promise<unknown> {
  return page.evaluate(async (address): Promise<unknown> => {
    const response = await fetch(address);
    if (!response.ok) throw new Error(`${address} answered ${response.status}`);
    const body: unknown = await response.json();
    return body;
  }, `/api/v1${path}`);
}

/** Stores a document as a new scenario of the first project, for tests about something else than that; gives its address. */
export async function storeScenario(page: Page, document: Scenario): Promise<string> {
  const id = await page.evaluate(async (stored) => {
    const session = await (await fetch('/api/v1/session')).json();
    const projects = await (await fetch('/api/v1/projects')).json();
    const response = await fetch(`/api/v1/projects/${projects.items[0].id}/scenarios`, {
      method: 'POST',
      headers: { 'Content-Type': 'application/json', 'X-CSRF-Token': session.csrfToken },
      body: JSON.stringify({ document: stored }),
    });
    if (!response.ok) throw new Error(await response.text());
    return String((await response.json()).id);
  }, document);
  return `/scenarios/${id}`;
}
