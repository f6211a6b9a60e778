import { Drop } from "./wordmark";

const lines = Array.from({ length: 26 }, (_, index) => 116 + index * 32);

/**
 * The left side of the sign-in page: a drop gathering under the head rule, the account it is for (in
 * words: no figure of anybody's field belongs here), and how to read a range. Decoration: hidden from
 * screen readers, replaced by a band on a phone.
 */
export function SignInScene() {
  return (
    <div className="sign-in-scene" aria-hidden="true">
      <svg viewBox="0 0 720 900" preserveAspectRatio="xMinYMin slice" focusable="false">
        <g className="lines">
          {lines.map((y) => (
            <line key={y} x1="0" x2="720" y1={y} y2={y} />
          ))}
        </g>
        <g className="margin-lines">
          <line x1="92" x2="92" y1="0" y2="900" />
          <line x1="96" x2="96" y1="0" y2="900" />
        </g>
        <rect className="head-rule" x="0" y="110" width="720" height="7" />
        <g transform="translate(164 11) scale(21)">
          <Drop className="drop" />
          <path className="glint" d="M9 15.6C8.9 17.2 9.6 18.4 10.8 19" />
        </g>
        <g className="words">
          <text className="entry" x="140" y="523">
            Condensate in place
          </text>
          <text className="entry" x="140" y="555">
            less what stays in the rock
          </text>
          <text className="entry" x="140" y="587">
            less what stays in the gas
          </text>
          <text className="entry entry-total" x="140" y="619">
            What reaches the tank
          </text>
          <rect className="entry-part" x="440" y="512" width="200" height="10" />
          <rect className="entry-rock" x="567" y="544" width="73" height="10" />
          <rect className="entry-gas" x="556" y="576" width="11" height="10" />
          <rect className="entry-part" x="440" y="608" width="116" height="10" />
        </g>
        <g className="double">
          <line x1="440" x2="640" y1="596" y2="596" />
          <line x1="140" x2="640" y1="627" y2="627" />
          <line x1="140" x2="640" y1="631" y2="631" />
        </g>
        <g className="mark">
          <line x1="204" x2="588" y1="708" y2="708" />
          <line x1="350" x2="350" y1="688" y2="728" />
          <circle cx="384" cy="708" r="10" />
          <text x="204" y="756">
            P90
          </text>
          <text x="350" y="756">
            P50
          </text>
          <text x="588" y="756">
            P10
          </text>
          <text className="meaning" x="204" y="780">
            at least, 9 in 10
          </text>
          <text className="meaning" x="350" y="780">
            even odds
          </text>
          <text className="meaning" x="588" y="780">
            at least, 1 in 10
          </text>
        </g>
      </svg>
    </div>
  );
}
