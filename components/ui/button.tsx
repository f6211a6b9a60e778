import Link from "next/link";
import type { ComponentProps } from "react";
import { classNames } from "./class-names";
import { Icon, type IconName } from "./icon";

interface Look {
  /** one primary action a page; `inverse` on the dark selection bar */
  kind?: "primary" | "plain" | "quiet" | "inverse";
  size?: "small" | "normal";
  icon?: IconName;
}

const look = ({ kind = "plain", size, className }: Look & { className?: string }) =>
  classNames(
    "button",
    kind !== "plain" && `button-${kind}`,
    size === "small" && "button-small",
    className,
  );

export type ButtonProps = Look & ComponentProps<"button"> & { busy?: boolean; busyLabel?: string };

/** `busy` keeps focus and announces itself instead of disabling under the person's finger. */
export function Button({
  kind,
  size,
  icon,
  busy = false,
  busyLabel,
  className,
  children,
  type = "button",
  onClick,
  ...rest
}: ButtonProps) {
  return (
    <button
      {...rest}
      type={busy ? "button" : type}
      aria-disabled={busy || undefined}
      onClick={busy ? undefined : onClick}
      className={look({ kind, size, className })}
    >
      {icon && <Icon name={icon} size={13} />}
      {busy ? (busyLabel ?? "Working…") : children}
    </button>
  );
}

export type LinkButtonProps = Look & ComponentProps<typeof Link>;

export function LinkButton({ kind, size, icon, className, children, ...rest }: LinkButtonProps) {
  return (
    <Link {...rest} className={look({ kind, size, className })}>
      {icon && <Icon name={icon} size={13} />}
      {children}
    </Link>
  );
}

export type IconButtonProps = ComponentProps<"button"> & { icon: IconName; label: string };

/** For the few actions whose shape everybody knows: close, theme. The label is read out and shown. */
export function IconButton({ icon, label, className, type = "button", ...rest }: IconButtonProps) {
  return (
    <button
      {...rest}
      type={type}
      aria-label={label}
      title={label}
      className={classNames("icon-button", className)}
    >
      <Icon name={icon} size={14} />
    </button>
  );
}
