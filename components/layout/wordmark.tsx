import Link from "next/link";

const DROP =
  "M4.4 5C9 5.2 10.8 6.7 10.6 8.9C10.4 11.2 7.4 12.7 7.4 16.2A4.6 4.6 0 0 0 16.6 16.2C16.6 12.7 13.6 11.2 13.4 8.9C13.2 6.7 15 5.2 19.6 5Z";

/** The drop that gathers under a ruled line; also drawn large on the sign-in page. */
export const Drop = ({ className }: { className: string }) => (
  <path className={className} d={DROP} />
);

export function Wordmark({ href, size = 24 }: { href: string; size?: number }) {
  return (
    <Link className="wordmark" href={href}>
      <svg width={size} height={size} viewBox="0 0 24 24" aria-hidden="true" focusable="false">
        <Drop className="wordmark-drop" />
        <rect className="wordmark-rule" x="0.5" y="2.8" width="23" height="2.4" />
      </svg>
      <span>Dewledger</span>
    </Link>
  );
}
