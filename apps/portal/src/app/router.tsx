import { lazy, Suspense, type ReactNode } from 'react';
import { Navigate, Route, Routes } from 'react-router-dom';
import { Loading } from '../components/ui/loading.tsx';
import { deskFor, useMaybeSession } from '../lib/session.ts';
import { ErrorBoundary } from './error-boundary.tsx';
import { DeskLayout } from './layouts/desk-layout.tsx';
import { PublicLayout } from './layouts/public-layout.tsx';
import { NotFound } from './not-found.tsx';
import { routeTable, type PortalRoute } from './route-table.ts';

const screens = routeTable.map((route) => ({
  route,
  Screen: lazy(async () => ({ default: (await route.lazy()).Component })),
}));

export function Router() {
  const elements = (isPublic: boolean) =>
    screens
      .filter(({ route }) => (route.public ?? false) === isPublic)
      .map(({ route, Screen }) => (
        <Route
          key={route.path}
          path={route.path}
          element={
            <Page route={route}>
              <Screen />
            </Page>
          }
        />
      ));
  return (
    <Routes>
      <Route element={<PublicLayout />}>{elements(true)}</Route>
      <Route
        element={
          <Suspense fallback={<Loading label="Loading the portal" />}>
            <DeskLayout />
          </Suspense>
        }
      >
        <Route index element={<ToDesk />} />
        {elements(false)}
        <Route path="*" element={<NotFound />} />
      </Route>
    </Routes>
  );
}

function Page({ route, children }: { route: PortalRoute; children: ReactNode }) {
  const permissions = useMaybeSession()?.permissions ?? [];
  const wanted = route.needs === undefined ? [] : [route.needs].flat();
  if (wanted.length > 0 && !wanted.some((permission) => permissions.includes(permission)))
    return <NotFound />;
  return (
    <div className={route.wide ? undefined : 'mx-auto max-w-[1440px]'}>
      <ErrorBoundary>
        <Suspense fallback={<Loading />}>{children}</Suspense>
      </ErrorBoundary>
    </div>
  );
}

function ToDesk() {
  const session = useMaybeSession();
  return <Navigate to={deskFor(session?.user.roles ?? [])} replace />;
}
