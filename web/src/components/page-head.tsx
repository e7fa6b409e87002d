import type { ReactNode } from 'react';
import { PageTitle } from './page-title.tsx';

/** Head of a page: the quiet line above, the title, the opening sentence, and facts or acts below. Sets the tab's title too. */
export function PageHead({ above, title, tab, opening, slim = false, children }: { above?: ReactNode; title: string; tab?: string; opening?: ReactNode; slim?: boolean; children?: ReactNode }) {
  return (
    <div className={slim ? 'head slim' : 'head'}>
      <PageTitle>{tab ?? title}</PageTitle>
      {above ? <p className="above">{above}</p> : null}
      <h1>{title}</h1>
      {opening ? <p className="opening">{opening}</p> : null}
      {children}
    </div>
  );
}
