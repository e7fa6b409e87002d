/** How far a job has come, 0 to 1, with words for it. */
export function Progress({ value, label }: { value: number; label: string }) {
  const percent = Math.round(Math.min(1, Math.max(0, value)) * 100);
  return (
    <div className="progress" role="progressbar" aria-label={label} aria-valuemin={0} aria-valuemax={100} aria-valuenow={percent}>
      <svg width="100%" height="100%" aria-hidden="true" focusable="false"><rect width={`${percent}%`} height="100%" /></svg>
    </div>
  );
}
