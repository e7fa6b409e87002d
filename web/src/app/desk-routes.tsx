import type { LazyRouteFunction, RouteObject } from 'react-router-dom';
import type { RouteModule } from './lazy-route.ts';

type PageOf = (load: () => Promise<RouteModule>) => LazyRouteFunction<RouteObject>;

/** Pages behind sign-in: desk, run sheets, submissions, reviews, tokens, the steward’s office. */
export const deskRoutes = (page: PageOf): RouteObject[] => [
  {
    path: 'desk',
    lazy: page(() => import('./routes/desk/layout.tsx')),
    children: [
      {
        lazy: page(() => import('./routes/desk/contributor.tsx')),
        children: [
          { index: true, lazy: page(() => import('./routes/desk/home.tsx')) },
          { path: 'run-sheets', lazy: page(() => import('./routes/desk/run-sheets.tsx')) },
          { path: 'run-sheets/new', lazy: page(() => import('./routes/desk/run-sheet-new.tsx')) },
          { path: 'submissions', lazy: page(() => import('./routes/desk/submissions.tsx')) },
          { path: 'submissions/new', lazy: page(() => import('./routes/desk/submission-new.tsx')) },
          { path: 'devices', lazy: page(() => import('./routes/desk/devices.tsx')) },
          { path: 'tokens', lazy: page(() => import('./routes/desk/tokens.tsx')) },
        ],
      },
      // A curator or steward may read these too; the registry decides.
      { path: 'run-sheets/:id', lazy: page(() => import('./routes/desk/run-sheet.tsx')) },
      { path: 'submissions/:id', lazy: page(() => import('./routes/desk/submission.tsx')) },
    ],
  },
  {
    path: 'review',
    lazy: page(() => import('./routes/review/layout.tsx')),
    children: [
      { path: 'withdrawals', lazy: page(() => import('./routes/review/withdrawals.tsx')) },
      { path: ':id?', lazy: page(() => import('./routes/review/desk.tsx')) },
    ],
  },
  {
    path: 'steward',
    lazy: page(() => import('./routes/steward/layout.tsx')),
    children: [
      { index: true, lazy: page(() => import('./routes/steward/home.tsx')) },
      { path: 'campaigns', lazy: page(() => import('./routes/steward/campaigns.tsx')) },
      { path: 'campaigns/:id', lazy: page(() => import('./routes/steward/campaign.tsx')) },
      { path: 'jobs', lazy: page(() => import('./routes/steward/jobs.tsx')) },
      { path: 'mail', lazy: page(() => import('./routes/steward/mail.tsx')) },
      { path: 'people', lazy: page(() => import('./routes/steward/people.tsx')) },
    ],
  },
];
