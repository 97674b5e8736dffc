import { Outlet, type RouteObject } from 'react-router-dom';
import { organisationRouteId } from '../features/sign-in/membership.ts';
import { NotFoundPage } from '../pages/not-found-page.tsx';
import { ProblemPage } from '../pages/problem-page.tsx';
import { FirstPaint } from './first-paint.tsx';
import { OrganisationFrame } from './organisation-frame.tsx';
import { loadOrganisation } from './organisation-loader.ts';
import { paths } from './paths.ts';
import { PlainFrame, PlainProblem } from './plain-frame.tsx';
import { Root } from './root.tsx';

const organisationId = ':organisationId';
const id = ':id';

/** Pages about one organisation, below its navigation; a problem on one of them leaves the navigation in place. */
const organisationPages: RouteObject[] = [
  { index: true, lazy: () => import('../pages/home-page.tsx') },
  { path: paths.cables(organisationId), lazy: () => import('../pages/cables-page.tsx') },
  { path: paths.newCable(organisationId), lazy: () => import('../pages/cable-new-page.tsx') },
  { path: paths.importCables(organisationId), lazy: () => import('../pages/cable-import-page.tsx') },
  { path: paths.compareCables(organisationId), lazy: () => import('../pages/cable-compare-page.tsx') },
  { path: paths.cable(organisationId, id), lazy: () => import('../pages/cable-page.tsx') },
  { path: paths.editCable(organisationId, id), lazy: () => import('../pages/cable-edit-page.tsx') },
  { path: paths.newMeasurement(organisationId, id), lazy: () => import('../pages/measurement-new-page.tsx') },
  {
    path: paths.measurement(organisationId, id, ':measurementId'),
    lazy: () => import('../pages/measurement-page.tsx'),
  },
  { path: paths.studies(organisationId), lazy: () => import('../pages/studies-page.tsx') },
  { path: paths.newStudy(organisationId), lazy: () => import('../pages/study-new-page.tsx') },
  { path: paths.study(organisationId, id), lazy: () => import('../pages/study-page.tsx') },
  { path: paths.editStudy(organisationId, id), lazy: () => import('../pages/study-edit-page.tsx') },
  { path: paths.amendStudy(organisationId, id), lazy: () => import('../pages/study-amend-page.tsx') },
  { path: paths.codes(organisationId, id), lazy: () => import('../pages/codes-page.tsx') },
  { path: paths.labels(organisationId, id), lazy: () => import('../pages/labels-page.tsx') },
  { path: paths.report(organisationId, id), lazy: () => import('../pages/report-page.tsx') },
  { path: paths.publish(organisationId, id), lazy: () => import('../pages/publish-page.tsx') },
  { path: paths.reports(organisationId), lazy: () => import('../pages/reports-page.tsx') },
  { path: paths.sessions(organisationId), lazy: () => import('../pages/sessions-page.tsx') },
  { path: paths.session(organisationId, id), lazy: () => import('../pages/session-page.tsx') },
  { path: paths.levels(organisationId, id), lazy: () => import('../pages/levels-page.tsx') },
  { path: paths.planSession(organisationId, id), lazy: () => import('../pages/session-plan-page.tsx') },
  { path: paths.rigPresets(organisationId), lazy: () => import('../pages/rig-presets-page.tsx') },
  { path: paths.editRigPreset(organisationId, id), lazy: () => import('../pages/rig-preset-edit-page.tsx') },
  { path: paths.newRigPreset(organisationId, id), lazy: () => import('../pages/rig-preset-new-page.tsx') },
  { path: paths.people(organisationId), lazy: () => import('../pages/people-page.tsx') },
  { path: paths.invitations(organisationId), lazy: () => import('../pages/invitations-page.tsx') },
  { path: paths.mail(organisationId), lazy: () => import('../pages/mail-page.tsx') },
  { path: paths.proof(organisationId), lazy: () => import('../pages/proof-page.tsx') },
  { path: `${paths.home(organisationId)}/*`, Component: NotFoundPage },
];

/** Pages that stand alone: signing in, what is published, help, and addresses that lead nowhere. */
const plainPages: RouteObject[] = [
  { path: paths.signIn(), lazy: () => import('../pages/sign-in-page.tsx') },
  { path: paths.start(), lazy: () => import('../pages/start-page.tsx') },
  { path: paths.publications(), lazy: () => import('../pages/publications-page.tsx') },
  { path: paths.publication(id), lazy: () => import('../pages/publication-page.tsx') },
  { path: paths.registry(organisationId), lazy: () => import('../pages/registry-page.tsx') },
  { path: paths.verify(), lazy: () => import('../pages/verify-page.tsx') },
  { path: paths.account(), lazy: () => import('../pages/account-page.tsx') },
  { path: paths.invitation(), lazy: () => import('../pages/invitation-page.tsx') },
  { path: paths.firstOwner(), lazy: () => import('../pages/first-owner-page.tsx') },
  { path: paths.forgottenPassword(), lazy: () => import('../pages/forgotten-password-page.tsx') },
  { path: paths.newPassword(), lazy: () => import('../pages/new-password-page.tsx') },
  { path: paths.mailbox(), lazy: () => import('../pages/mailbox-page.tsx') },
  { path: paths.mailboxMail(id), lazy: () => import('../pages/mailbox-mail-page.tsx') },
  { path: paths.help(), lazy: () => import('../pages/help-page.tsx') },
  { path: '*', Component: NotFoundPage },
];

/** The console fills the window and brings its own dim layout. */
const windowPages: RouteObject[] = [
  { path: paths.console(organisationId, id), lazy: () => import('../pages/console-page.tsx') },
  ...(import.meta.env.DEV ? [{ path: paths.kit(), lazy: () => import('../pages/kit-page.tsx') }] : []),
];

export const routes: RouteObject[] = [
  {
    Component: Root,
    HydrateFallback: FirstPaint,
    ErrorBoundary: PlainProblem,
    children: [
      {
        id: organisationRouteId,
        path: paths.home(organisationId),
        loader: loadOrganisation,
        Component: OrganisationFrame,
        ErrorBoundary: PlainProblem,
        children: [{ ErrorBoundary: ProblemPage, Component: Outlet, children: organisationPages }],
      },
      {
        Component: PlainFrame,
        ErrorBoundary: PlainProblem,
        children: [{ ErrorBoundary: ProblemPage, Component: Outlet, children: plainPages }],
      },
      { ErrorBoundary: PlainProblem, Component: Outlet, children: windowPages },
    ],
  },
];
