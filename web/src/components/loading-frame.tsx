import { useEffect, useState } from 'react';

const patienceMs = 400;

/** The frame of what is coming, after 400 ms, without movement. A quick answer shows no frame at all. */
export function LoadingFrame({ label, rows = 3 }: { label: string; rows?: number }) {
  const [late, setLate] = useState(false);
  useEffect(() => {
    const timer = setTimeout(() => setLate(true), patienceMs);
    return () => clearTimeout(timer);
  }, []);
  return (
    <div role="status" className="loading" data-late={late || undefined}>
      {late ? (
        <>
          <p className="tbl">{label}</p>
          <div className="ghost" aria-hidden="true">
            {Array.from({ length: rows }, (_, i) => <div key={i}><i className="g1" /><i className="g2" /><i className="axisghost" /><i className="g3" /></div>)}
          </div>
        </>
      ) : null}
    </div>
  );
}
