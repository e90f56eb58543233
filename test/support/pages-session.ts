import type { Page } from 'playwright-core';

export interface Account {
  email: string;
  password: string;
}

/** Signs in through the page and waits for the projects. */
export async function signIn(page: Page, { email, password }: Account): Promise<void> {
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password').fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.getByRole('heading', { level: 1, name: /^Projects of/ }).waitFor();
}

/** Signs a window in without its page, for tests about something else, and opens the projects. */
export async function signInQuietly(page: Page, account: Account): Promise<void> {
  const { request } = page.context();
  const { csrfToken } = await (await request.get('/api/v1/session')).json();
  const headers = { 'X-CSRF-Token': String(csrfToken) };
  const response = await request.post('/api/v1/session', { data: account, headers });
  if (!response.ok()) throw new Error(`The sign-in answered ${response.status()}.`);
  await page.goto('/projects');
  await page.getByRole('heading', { level: 1, name: /^Projects of/ }).waitFor();
}

/** Opens the printed link, fills the form and waits for the projects of the new workspace. */
export async function makeFirstOwner(
  page: Page,
  setupUrl: string,
  owner: Account & { workspace: string; name: string },
): Promise<void> {
  await page.goto(setupUrl);
  await page.getByLabel('Workspace').fill(owner.workspace);
  await page.getByLabel('Your name').fill(owner.name);
  await page.getByLabel('E-mail').fill(owner.email);
  await page.getByLabel('Password').fill(owner.password);
  await page.getByRole('button', { name: 'Make the workspace' }).click();
  await page.getByRole('heading', { level: 1, name: `Projects of ${owner.workspace}` }).waitFor();
}
