import { TokensPage } from '#web/features/tokens/components/tokens-page.tsx';
import { useDesk } from './contributor.tsx';

function Tokens() {
  const { organisation } = useDesk();
  return <TokensPage key={organisation.id} organisation={organisation} />;
}

export { Tokens as Component };
