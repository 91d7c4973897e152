import type { ComponentType } from 'react'
import { createBrowserRouter, Navigate, type RouteObject } from 'react-router-dom'
import type { RouteName } from '../../shared/api/routes.ts'
import { Allowed } from './Allowed.tsx'
import { NotFoundPage } from './NotFoundPage.tsx'
import { RouteError } from './RouteError.tsx'
import { Loading } from './Loading.tsx'
import { Shell } from './Shell.tsx'

type Module = { default: ComponentType }

/** A page loaded when first visited, behind the call that it lives on, with its own error boundary. */
function page(path: string, needs: RouteName, load: () => Promise<Module>): RouteObject {
  return {
    path,
    errorElement: <RouteError />,
    lazy: async () => {
      const { default: Component } = await load()
      return {
        element: (
          <Allowed route={needs}>
            <Component />
          </Allowed>
        ),
      }
    },
  }
}

export const routeTable: RouteObject[] = [
  {
    path: '/sign-in',
    errorElement: <RouteError />,
    HydrateFallback: Loading,
    lazy: async () => ({ Component: (await import('../features/sign-in/SignInPage.tsx')).default }),
  },
  {
    path: '/',
    element: <Shell />,
    errorElement: <RouteError />,
    HydrateFallback: Loading,
    children: [
      { index: true, element: <Navigate to="/parts" replace /> },
      page('parts', 'listParts', () => import('../features/parts/PartsPage.tsx')),
      page('parts/new', 'uploadDrawing', () => import('../features/parts/NewPartPage.tsx')),
      page('parts/:id', 'getPart', () => import('../features/parts/PartPage.tsx')),
      page('setups', 'listSetups', () => import('../features/setups/SetupsPage.tsx')),
      page('setups/:id', 'getSetup', () => import('../features/bench/BenchPage.tsx')),
      page('setups/:id/joint/:edge', 'getSetup', () => import('../features/joint/JointPage.tsx')),
      page('setups/:id/sheet', 'getSetup', () => import('../features/sheet/SheetPage.tsx')),
      page('approvals', 'approveSetup', () => import('../features/approvals/ApprovalsPage.tsx')),
      page('approvals/:id', 'approveSetup', () => import('../features/approvals/ReviewPage.tsx')),
      page('heads', 'listHeads', () => import('../features/heads/HeadsPage.tsx')),
      page('people', 'listUsers', () => import('../features/people/PeoplePage.tsx')),
      page('record', 'listAudit', () => import('../features/record/RecordPage.tsx')),
      page('account', 'ownSessions', () => import('../features/account/AccountPage.tsx')),
      { path: '*', element: <NotFoundPage /> },
    ],
  },
]

export const makeRouter = () => createBrowserRouter(routeTable)
