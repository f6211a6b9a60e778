/** Strokes on a 12 × 12 grid. Words beat icons: an icon stands beside a word or has a label on its button. */
const paths = {
  "chevron-down": "M2.5 4.5L6 8l3.5-3.5",
  "chevron-right": "M4.5 2.5L8 6l-3.5 3.5",
  tick: "M2.5 6.5l2.5 2.5 4.5-6",
  warning: "M6 1.2L11.2 10.5H.8zM6 4.6v2.8M6 8.7v.4",
  info: "M6 1a5 5 0 1 0 0 10A5 5 0 0 0 6 1zM6 5.4v3M6 3.3v.4",
  clock: "M6 1a5 5 0 1 0 0 10A5 5 0 0 0 6 1zM6 3.2V6l2 1.4",
  file: "M2.5 1h4.2L9.5 3.8V11h-7zM6.5 1v3h3",
  search: "M5 9A4 4 0 1 0 5 1a4 4 0 0 0 0 8zM8 8l3.2 3.2",
  pencil: "M2 10l.6-2.6L8.4 1.6l2 2L4.6 9.4z",
  moon: "M10 7.4A4.6 4.6 0 1 1 4.6 2 3.8 3.8 0 0 0 10 7.4z",
  up: "M6 10.5V2M2.8 5L6 1.8 9.2 5",
  down: "M6 2v8M3 7l3 3 3-3",
  "sort-up": "M6 10V2M3 5l3-3 3 3",
  close: "M2.5 2.5l7 7M9.5 2.5l-7 7",
  return: "M4.5 2L1.8 4.7 4.5 7.4M2 4.7h5a3 3 0 0 1 0 5.6H5",
  lock: "M3 5.5V4a3 3 0 0 1 6 0v1.5M2 5.5h8v5H2z",
  plus: "M6 1.5v9M1.5 6h9",
  print: "M3 4V1.2h6V4M3 8.5H1.2V4h9.6v4.5H9M3 7h6v4H3z",
  superseded: "M2 6h8M7 3l3 3-3 3",
} as const;

export type IconName = keyof typeof paths;

export function Icon({ name, size = 12 }: { name: IconName; size?: number }) {
  return (
    <svg
      className="icon"
      width={size}
      height={size}
      viewBox="0 0 12 12"
      aria-hidden="true"
      focusable="false"
    >
      <path d={paths[name]} />
    </svg>
  );
}
