import type { RouteConfig } from '@react-router/dev/routes';
import { index, layout, prefix, route } from '@react-router/dev/routes';

/** The map of the product, in the order of the work. */
export default [
  // Open to everybody
  index('routes/public/home.tsx'),
  route('how-we-compute', 'routes/public/method.tsx'),

  // Sign-in
  route('sign-in', 'routes/auth/sign-in.tsx'),
  route('sign-out', 'routes/auth/sign-out.tsx'),
  route('invitation/:token', 'routes/auth/invitation.tsx'),
  route('forgotten-password', 'routes/auth/forgotten-password.tsx'),
  route('new-password/:token', 'routes/auth/new-password.tsx'),
  route('account', 'routes/auth/account.tsx'),

  // Report: signed in, or by the code of a site
  route('report', 'routes/public/report.tsx'),
  route('report/sun', 'routes/resources/report-sun.ts'),
  route('report/:clientId/photos', 'routes/resources/report-photos.ts'),
  route('report/:clientId/words', 'routes/resources/report-words.ts'),
  route('received/:receipt', 'routes/public/report-received.tsx'),
  route('progress', 'routes/public/progress.tsx'),

  // Register and cases
  layout('routes/cases/area.tsx', [
    route('cases', 'routes/cases/register.tsx'),
    route('cases/map', 'routes/cases/register-map.tsx'),
    route('cases/:caseNumber', 'routes/cases/case.tsx', [
      index('routes/cases/account.tsx'),
      route('triage', 'routes/cases/triage.tsx'),
      route('measurements', 'routes/cases/measurements.tsx'),
      route('scene', 'routes/cases/scene.tsx'),
      route('skyline', 'routes/cases/skyline.tsx'),
      route('weather', 'routes/cases/weather.tsx'),
      route('photos', 'routes/cases/photos.tsx'),
      route('photos/:label/marks', 'routes/cases/photo-marks.tsx'),
      route('photos/:photoId/measure', 'routes/cases/photo-measure.tsx'),
      route('reconstructions', 'routes/cases/reconstructions.tsx'),
      route('reconstructions/compare', 'routes/cases/run-comparison.tsx'),
      route('reconstructions/:number', 'routes/cases/reconstruction.tsx'),
      route('evidence', 'routes/cases/evidence.tsx'),
      route('evidence/:letter', 'routes/cases/evidence-item.tsx'),
      route('witnesses', 'routes/cases/witnesses.tsx'),
      route('timeline', 'routes/cases/timeline.tsx'),
      route('hypotheses', 'routes/cases/hypotheses.tsx'),
      route('findings', 'routes/cases/findings.tsx'),
      route('report', 'routes/cases/report.tsx'),
      route('actions', 'routes/cases/actions.tsx'),
      route('releases', 'routes/cases/releases.tsx'),
      route('releases/:number', 'routes/cases/release.tsx'),
      route('log', 'routes/cases/log.tsx'),
      route('undo', 'routes/cases/undo.tsx'),
    ]),
    route('actions', 'routes/actions/list.tsx'),
  ]),

  // Pages of a case that are printed
  route('cases/:caseNumber/measurements/sheet', 'routes/cases/measurement-sheet.tsx'),
  route('cases/:caseNumber/evidence/:letter/label', 'routes/cases/evidence-label.tsx'),

  // Case files: what an insurer reads
  layout('routes/case-files/area.tsx', [
    route('case-files', 'routes/case-files/list.tsx'),
    route('case-files/:releaseId', 'routes/case-files/case-file.tsx'),
  ]),
  route('case-files/:releaseId/files/:fileName', 'routes/case-files/file.ts'),

  // Sites and people
  route('sites', 'routes/sites/list.tsx'),
  route('sites/:siteCode', 'routes/sites/site.tsx'),
  route('sites/:siteCode/plans', 'routes/sites/plans.tsx'),
  route('sites/:siteCode/plans/:planId', 'routes/sites/plan.tsx'),
  route('sites/:siteCode/door-card', 'routes/sites/door-card.tsx'),
  route('sites/:siteCode/skyline', 'routes/sites/skyline.tsx'),
  route('people', 'routes/people/list.tsx'),
  route('log', 'routes/people/log.tsx'),

  // Every other address
  route('*', 'routes/public/nowhere.tsx'),

  // Files and pages without a screen of their own
  route('photos/:photoId/:rendition', 'routes/resources/photo.ts'),
  route('cases/:caseNumber/report.pdf', 'routes/resources/report-pdf.ts'),
  route('documents/:documentId', 'routes/resources/document.ts'),
  route('proofs/:proofId', 'routes/resources/proof.ts'),
  route('site-plans/:planId', 'routes/resources/site-plan.ts'),
  route('cases/:caseNumber/reconstructions/:number/figures/:fileName', 'routes/resources/run-figure.ts'),
  route('actions/calendar', 'routes/resources/action-calendar.ts'),
  ...prefix('development', [
    route('mailbox', 'routes/resources/mailbox.tsx'),
    route('mailbox/:messageId', 'routes/resources/mailbox-message.tsx'),
  ]),

  // Programming interface
  ...prefix('api/v1', [
    route('sun', 'routes/api/sun.ts'),
    route('clear-sky', 'routes/api/clear-sky.ts'),
    route('reconstructions', 'routes/api/reconstructions.ts'),
    route('reconstructions/:computationId', 'routes/api/reconstruction.ts'),
    route('recurrence', 'routes/api/recurrence.ts'),
    route('openapi.json', 'routes/api/openapi.ts'),
  ]),
] satisfies RouteConfig;
