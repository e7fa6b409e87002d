import { Link, useLocation } from 'react-router-dom';
import { PageHead } from '#web/components/page-head.tsx';
import { Wrap } from '#web/components/wrap.tsx';

export function Component() {
  const { pathname } = useLocation();
  return (
    <Wrap>
      <PageHead title="There is no page here" opening={<>No page has the address <code>{pathname}</code>.</>}>
        <p className="acts notfound"><Link className="btn" to="/find">Find a device, provider or entry</Link><Link to="/boards">All boards</Link></p>
      </PageHead>
    </Wrap>
  );
}
