/** How a row is drawn, in small, beside the sentence that says how to read it. */
export function KeyLine({ ranked }: { ranked: boolean }) {
  return (
    <div className="keyline">
      <div className="key" aria-hidden="true">
        <svg width="210" height="40">
          <svg y="15" className="ov">
            <g className="beam">
              <rect x="4" y="-1" width="202" height="2" />
              <rect x="39" y="-2.5" width="132" height="5" />
              <rect x="70" y="-5" width="70" height="10" />
              <circle className="dot" cx="105" cy="0" r="3.5" />
            </g>
            <text x="105" y="23" textAnchor="middle">50 %</text>
            <text x="54" y="23" textAnchor="middle">80 %</text>
            <text x="14" y="23" textAnchor="middle">95 %</text>
          </svg>
        </svg>
      </div>
      <p className="says">Each row shows one entry on one axis for all: the dot is the estimate, the steps hold 50, 80 and 95 % of the uncertainty. {ranked
        ? 'Two rows whose steps overlap may still differ, and two whose steps lie apart need not: read the rank ranges and the brackets. The order of rows inside a bracket carries no meaning.'
        : 'Rows stand in the order of their estimates, which carries no ranks.'}</p>
    </div>
  );
}
