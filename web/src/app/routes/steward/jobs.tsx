export { JobsPage as Component } from '#web/features/steward/components/jobs-page.tsx';
