import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { TokenCreated } from '#shared/contracts/session.ts';
import { PageHead } from '#web/components/page-head.tsx';
import { Read } from '#web/components/read.tsx';
import { Section } from '#web/components/section.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { tokensQuery } from '../api/tokens.ts';
import { NewToken } from './new-token.tsx';
import { TokenList } from './token-list.tsx';
import { TokenSecret } from './token-secret.tsx';

export function TokensPage({ organisation }: { organisation: { id: string; name: string } }) {
  const tokens = useQuery(tokensQuery(organisation.id));
  const [fresh, setFresh] = useState<TokenCreated | null>(null);
  return (
    <Wrap>
      <PageHead slim title="Tokens" />
      <Section title="In use" aside={`Of ${organisation.name}`}>
        <Read query={tokens} what="The list of tokens" loading="Loading the tokens">
          {({ items }) => <TokenList tokens={items} organisation={organisation.id} />}
        </Read>
      </Section>
      <Section title="New token" notes={<>
        <p><strong>What it may do.</strong> Submit datasets, read and cancel submissions, draw and read run sheets, all for this organisation. It may not decide, and it may not make tokens.</p>
        <p><strong>How it is sent.</strong> In the header <code>Authorization: Bearer …</code> of each request.</p>
      </>}>
        {fresh ? <TokenSecret token={fresh} onClose={() => setFresh(null)} /> : <NewToken organisation={organisation.id} onCreated={setFresh} />}
      </Section>
    </Wrap>
  );
}
