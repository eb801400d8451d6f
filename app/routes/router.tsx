import { createBrowserRouter, Navigate, type RouteObject } from 'react-router-dom';
import { NotFoundPage, RouteErrorPage } from './shell/error-pages.tsx';
import { OpeningPage } from './shell/opening-page.tsx';
import { RootLayout } from './shell/root-layout.tsx';
import { SignedIn } from './shell/signed-in.tsx';

/** Each page is fetched when it is first opened. A page's module exports it as `Page`. */
const page = (load: () => Promise<{ Page: React.ComponentType }>) => ({
  lazy: async () => ({ Component: (await load()).Page }),
});

/** Pages for people who are not signed in. */
const openPages: RouteObject[] = [
  { path: '/sign-in', ...page(() => import('./session/sign-in-page.tsx')) },
  { path: '/setup/:token', ...page(() => import('./session/setup-page.tsx')) },
  { path: '/invite/:token', ...page(() => import('./session/invite-page.tsx')) },
  { path: '/forgot', ...page(() => import('./session/forgot-page.tsx')) },
  { path: '/reset/:token', ...page(() => import('./session/reset-page.tsx')) },
];

/** Pages of teams and of oneself. */
const ownPages: RouteObject[] = [
  { path: '/', ...page(() => import('./home/home-page.tsx')) },
  { path: '/team/:teamId', ...page(() => import('./team/team-page.tsx')) },
  { path: '/account', ...page(() => import('./account/account-page.tsx')) },
];

/** Pages of sites; their modules stand in `routes/site`. */
const sitePages: RouteObject[] = [
  { path: '/teams/:teamId/new-site', ...page(() => import('./site/new-site-page.tsx')) },
  {
    path: '/sites/:siteId',
    ...page(() => import('./site/site-layout.tsx')),
    children: [
      { index: true, element: <Navigate to="ground" replace /> },
      { path: 'ground', ...page(() => import('./site/ground-page.tsx')) },
      { path: 'plant', ...page(() => import('./site/plant-page.tsx')) },
      { path: 'fit', ...page(() => import('./site/fits-page.tsx')) },
      { path: 'fit/:fitId', ...page(() => import('./site/fit-page.tsx')) },
      { path: 'outlook', ...page(() => import('./site/outlook-page.tsx')) },
      { path: 'options', ...page(() => import('./site/options-page.tsx')) },
      { path: 'runs', ...page(() => import('./site/runs-page.tsx')) },
      { path: 'compare', ...page(() => import('./site/compare-page.tsx')) },
      { path: 'compare/:comparisonId', ...page(() => import('./site/comparison-page.tsx')) },
      { path: 'compare/:comparisonId/matters', ...page(() => import('./site/matters-page.tsx')) },
      { path: 'brief', ...page(() => import('./site/briefs-page.tsx')) },
      { path: 'briefs/:briefId', ...page(() => import('./site/brief-page.tsx')) },
      { path: 'runs/:runId', ...page(() => import('./site/run-page.tsx')) },
    ],
  },
];

export const routes: RouteObject[] = [
  {
    Component: RootLayout,
    ErrorBoundary: RouteErrorPage,
    HydrateFallback: OpeningPage,
    children: [
      ...openPages,
      { Component: SignedIn, children: [...ownPages, ...sitePages] },
      { path: '*', Component: NotFoundPage },
    ],
  },
];

export const createRouter = () => createBrowserRouter(routes);
