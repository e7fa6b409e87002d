import type { ReactNode } from 'react';

/** The page width: side margins and the widest line. */
export function Wrap({ className, children }: { className?: string; children: ReactNode }) {
  return <div className={className ? `wrap ${className}` : 'wrap'}>{children}</div>;
}
