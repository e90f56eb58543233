import type { ComponentType } from 'react';
import { createBrowserRouter, Navigate, type RouteObject } from 'react-router-dom';
import { Loading } from '#frontend/components/states.tsx';
import { AppFrame } from './app-frame.tsx';
import { RouteError } from './route-error.tsx';
import { SignedInOnly } from './signed-in-only.tsx';

const errorElement = <RouteError />;

/**
 * The file of a page. One that cannot be fetched becomes a page that throws: the router leaves the place of a route empty
 * whose `lazy` itself fails, and shows the error element only of what throws while it renders.
 */
function page(fetchPage: () => Promise<ComponentType>): () => Promise<{ Component: ComponentType }> {
  return () =>
    fetchPage().then(
      (Component) => ({ Component }),
      (error: unknown) => ({
        Component: () => {
          throw error;
        },
      }),
    );
}

/** Every page is a file of its own, fetched when it is first opened. */
export const ROUTES: RouteObject[] = [
  {
    element: <AppFrame />,
    errorElement: (
      <main>
        <RouteError />
      </main>
    ),
    hydrateFallbackElement: <Loading />,
    children: [
      {
        path: 'sign-in',
        errorElement,
        lazy: page(async () => (await import('./pages/sign-in-page.tsx')).SignInPage),
      },
      {
        path: 'setup',
        errorElement,
        lazy: page(async () => (await import('./pages/setup-page.tsx')).SetupPage),
      },
      {
        element: <SignedInOnly />,
        children: [
          { index: true, element: <Navigate to="/projects" replace /> },
          {
            path: 'projects',
            errorElement,
            lazy: page(async () => (await import('./pages/projects-page.tsx')).ProjectsPage),
          },
          {
            path: 'projects/:projectId',
            errorElement,
            lazy: page(async () => (await import('./pages/project-page.tsx')).ProjectPage),
          },
          {
            path: 'scenarios/:scenarioId',
            errorElement,
            lazy: page(async () => (await import('./pages/scenario-page.tsx')).ScenarioPage),
            children: [
              {
                index: true,
                errorElement,
                lazy: page(async () => (await import('./pages/scenario-node-tab.tsx')).ScenarioNodeTab),
              },
              { path: 'node', element: <Navigate to=".." relative="path" replace /> },
              {
                path: 'supply',
                errorElement,
                lazy: page(async () => (await import('./pages/scenario-supply-tab.tsx')).ScenarioSupplyTab),
              },
              {
                path: 'climate',
                errorElement,
                lazy: page(async () => (await import('./pages/scenario-climate-tab.tsx')).ScenarioClimateTab),
              },
              {
                path: 'target',
                errorElement,
                lazy: page(async () => (await import('./pages/scenario-target-tab.tsx')).ScenarioTargetTab),
              },
              {
                path: 'revisions',
                errorElement,
                lazy: page(async () => (await import('./pages/scenario-revisions-tab.tsx')).ScenarioRevisionsTab),
              },
            ],
          },
          {
            path: 'library',
            errorElement,
            lazy: page(async () => (await import('./pages/library-page.tsx')).LibraryPage),
            children: [
              { index: true, element: <Navigate to="parts" replace /> },
              {
                path: ':tab',
                lazy: page(async () => (await import('./pages/library-list-tab.tsx')).LibraryListTab),
              },
            ],
          },
          {
            path: 'library/items/:itemId',
            errorElement,
            lazy: page(async () => (await import('./pages/library-item-page.tsx')).LibraryItemPage),
          },
          {
            path: 'account',
            errorElement,
            lazy: page(async () => (await import('./pages/account-page.tsx')).AccountPage),
          },
        ],
      },
      {
        path: '*',
        errorElement,
        lazy: page(async () => (await import('./pages/not-found-page.tsx')).NotFoundPage),
      },
    ],
  },
];

export function createRouter(): ReturnType<typeof createBrowserRouter> {
  return createBrowserRouter(ROUTES);
}
