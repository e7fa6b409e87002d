import { useEffect, useRef, type ReactNode } from 'react';
import { Outlet, ScrollRestoration, useLocation } from 'react-router-dom';
import { Foot } from './foot.tsx';
import { TopBar } from './top-bar.tsx';

/** Header, page, footer. After a change of page the keyboard focus goes to the new page's start. */
export function AppShell({ children }: { children?: ReactNode }) {
  const { pathname } = useLocation();
  const main = useRef<HTMLElement>(null);
  const shown = useRef(pathname);
  useEffect(() => {
    if (shown.current === pathname) return;
    shown.current = pathname;
    main.current?.focus({ preventScroll: true });
  }, [pathname]);
  return (
    <>
      <a className="skip" href="#main">Skip to the content</a>
      <TopBar />
      <main id="main" ref={main} tabIndex={-1}>{children ?? <Outlet />}</main>
      <Foot />
      <ScrollRestoration />
    </>
  );
}
