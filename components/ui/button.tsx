import Link from "next/link";
import type { ComponentProps } from "react";

/** `primary`: the one act of a place, copper; `plain`: ruled; `quiet`: set like a link. */
export type ButtonVariant = "primary" | "plain" | "quiet";

export interface ButtonProps extends ComponentProps<"button"> {
  readonly variant?: ButtonVariant | undefined;
  /** The act is under way; the button stays readable and takes no second press. */
  readonly busy?: boolean | undefined;
}

function classOf(variant: ButtonVariant, className: string | undefined): string {
  return `button button-${variant}${className === undefined ? "" : ` ${className}`}`;
}

export function Button({
  variant = "plain",
  busy = false,
  type = "button",
  className,
  disabled,
  ...rest
}: ButtonProps) {
  return (
    <button
      {...rest}
      type={type}
      className={classOf(variant, className)}
      disabled={disabled === true || busy}
      aria-busy={busy || undefined}
    />
  );
}

export interface ButtonLinkProps extends ComponentProps<typeof Link> {
  readonly variant?: ButtonVariant | undefined;
}

export function ButtonLink({ variant = "plain", className, ...rest }: ButtonLinkProps) {
  return <Link {...rest} className={classOf(variant, className)} />;
}
