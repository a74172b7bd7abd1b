"use client";

import type { FormEvent, ReactNode } from "react";
import { useAwake } from "./submit-button";

export interface FormProps {
  readonly onSubmit: (event: FormEvent<HTMLFormElement>) => Promise<void>;
  readonly children: ReactNode;
}

/**
 * A form whose entries open once the page is awake: what was typed before would be lost to the values of the server,
 * and sent in the address.
 */
export function Form({ onSubmit, children }: FormProps) {
  const awake = useAwake();
  return (
    <form noValidate onSubmit={(event) => void onSubmit(event)}>
      <fieldset className="contents" disabled={!awake}>
        {children}
      </fieldset>
    </form>
  );
}
