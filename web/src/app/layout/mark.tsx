/** The mark beside the name: a beam that balances. */
export function Mark() {
  return (
    <svg viewBox="0 0 46 14" aria-hidden="true" focusable="false">
      <g className="beam">
        <rect x="0" y="6" width="46" height="2" />
        <rect x="8" y="4" width="30" height="6" />
        <rect x="14.5" y="0.5" width="17" height="13" />
        <circle className="dot" cx="23" cy="7" r="3.5" />
      </g>
    </svg>
  );
}
