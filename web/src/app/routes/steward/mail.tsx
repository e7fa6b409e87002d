export { MailPage as Component } from '#web/features/steward/components/mail-page.tsx';
