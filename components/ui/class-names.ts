/** Joins the class names that apply: `classNames("button", small && "button-small")`. */
export const classNames = (...names: (string | false | null | undefined)[]) =>
  names.filter(Boolean).join(" ");
