import { WithdrawalsPage } from '#web/features/withdrawals/components/withdrawals-page.tsx';

export function Component() {
  return <WithdrawalsPage />;
}
