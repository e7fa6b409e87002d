export { CampaignsPage as Component } from '#web/features/steward/components/campaigns-page.tsx';
