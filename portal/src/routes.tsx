import { createBrowserRouter } from 'react-router-dom'
import { AccountPage } from './shell/account-page.tsx'
import { BrokenPage } from './shell/broken-page.tsx'
import { NotFound } from './shell/not-found.tsx'
import { PublicPage } from './shell/public-page.tsx'
import { StaffPage } from './shell/staff-page.tsx'

/** Each sheet is its own chunk, read when it is first opened. */
export const router = createBrowserRouter([
  {
    element: <PublicPage />,
    errorElement: <BrokenPage />,
    hydrateFallbackElement: <></>,
    children: [
      { path: '/', lazy: async () => ({ Component: (await import('./features/home/home-screen.tsx')).HomeScreen }) },
      {
        path: '/cases',
        lazy: async () => ({ Component: (await import('./features/cases/catalogue-screen.tsx')).CatalogueScreen }),
      },
      {
        path: '/cases/:caseId',
        lazy: async () => ({ Component: (await import('./features/cases/case-screen.tsx')).CaseScreen }),
      },
      {
        path: '/docs',
        lazy: async () => ({ Component: (await import('./features/docs/docs-screen.tsx')).DocsScreen }),
      },
      {
        path: '/docs/:slug',
        lazy: async () => ({ Component: (await import('./features/docs/guide-screen.tsx')).GuideScreen }),
      },
      {
        path: '/reference',
        lazy: async () => ({ Component: (await import('./features/reference/reference-screen.tsx')).ReferenceScreen }),
      },
      {
        path: '/problems',
        lazy: async () => ({ Component: (await import('./features/problems/problems-screen.tsx')).ProblemsScreen }),
      },
      {
        path: '/problems/:code',
        lazy: async () => ({ Component: (await import('./features/problems/problem-screen.tsx')).ProblemScreen }),
      },
      {
        path: '/sign-up',
        lazy: async () => ({ Component: (await import('./features/access/sign-up-screen.tsx')).SignUpScreen }),
      },
      {
        path: '/sign-in',
        lazy: async () => ({ Component: (await import('./features/access/sign-in-screen.tsx')).SignInScreen }),
      },
      {
        path: '/staff/sign-in',
        lazy: async () => ({ Component: (await import('./features/staff/sign-in-screen.tsx')).StaffSignInScreen }),
      },
      { path: '*', Component: NotFound },
    ],
  },
  {
    element: <AccountPage />,
    errorElement: <BrokenPage />,
    hydrateFallbackElement: <></>,
    children: [
      {
        path: '/keys',
        lazy: async () => ({ Component: (await import('./features/keys/keys-screen.tsx')).KeysScreen }),
      },
      {
        path: '/usage',
        lazy: async () => ({ Component: (await import('./features/usage/usage-screen.tsx')).UsageScreen }),
      },
      {
        path: '/requests',
        lazy: async () => ({ Component: (await import('./features/requests/requests-screen.tsx')).RequestsScreen }),
      },
      {
        path: '/requests/:requestId',
        lazy: async () => ({ Component: (await import('./features/requests/request-screen.tsx')).RequestScreen }),
      },
      {
        path: '/materials',
        lazy: async () => ({ Component: (await import('./features/materials/materials-screen.tsx')).MaterialsScreen }),
      },
      {
        path: '/materials/:materialId',
        lazy: async () => ({ Component: (await import('./features/materials/material-screen.tsx')).MaterialScreen }),
      },
    ],
  },
  {
    element: <StaffPage />,
    errorElement: <BrokenPage />,
    hydrateFallbackElement: <></>,
    children: [
      {
        path: '/staff',
        lazy: async () => ({ Component: (await import('./features/staff/find-screen.tsx')).FindScreen }),
      },
      {
        path: '/staff/requests/:requestId',
        lazy: async () => ({
          Component: (await import('./features/staff/staff-request-screen.tsx')).StaffRequestScreen,
        }),
      },
    ],
  },
])
