"use client";

import { useSyncExternalStore } from "react";
import { Button, type ButtonProps } from "@/components/ui/button";

const never = (): (() => void) => () => undefined;

/** Whether the page's scripts run; not so in what the server sends. */
export function useAwake(): boolean {
  return useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
}

/** Sends a form once the page is awake: before that, the browser would put what was typed into the address. */
export function SubmitButton({ disabled, variant = "primary", ...rest }: Omit<ButtonProps, "type">) {
  const awake = useAwake();
  return <Button {...rest} type="submit" variant={variant} disabled={disabled === true || !awake} />;
}
