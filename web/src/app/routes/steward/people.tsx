export { PeoplePage as Component } from '#web/features/steward/components/people-page.tsx';
