import { useEffect, useRef, useState } from 'react';
import type { TokenCreated } from '#shared/contracts/session.ts';
import { Button } from '#web/components/button.tsx';
import { Message } from '#web/components/message.tsx';

/** The secret of a new token: shown here and never again. The field takes the focus with its text selected. */
export function TokenSecret({ token, onClose }: { token: TokenCreated; onClose: () => void }) {
  const field = useRef<HTMLInputElement>(null);
  const [copied, setCopied] = useState<'no' | 'yes' | 'by-hand'>('no');
  useEffect(() => { field.current?.focus(); field.current?.select(); }, [token.id]);
  const copy = (): void => {
    navigator.clipboard.writeText(token.secret).then(() => setCopied('yes'), () => { field.current?.select(); setCopied('by-hand'); });
  };
  return (
    <Message kind="done">
      <p>The token “{token.name}” is made. Copy its secret now: it is shown once, and the registry keeps only its hash.</p>
      <div className="secretrow">
        <div className="field">
          <label htmlFor="token-secret">Secret</label>
          <input ref={field} id="token-secret" className="mono" type="text" readOnly value={token.secret} spellCheck={false} onFocus={(event) => event.target.select()} />
        </div>
        <Button onClick={copy}>Copy</Button>
        <Button kind="plain" onClick={onClose}>I have it</Button>
      </div>
      <p role="status" className="small quiet">{copied === 'yes' ? 'Copied.' : copied === 'by-hand' ? 'This browser does not let the page copy. The secret is selected; copy it by keyboard.' : ''}</p>
    </Message>
  );
}
