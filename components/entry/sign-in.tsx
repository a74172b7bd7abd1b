"use client";

import { signIn } from "next-auth/react";
import { useState, type FormEvent } from "react";
import { SubmitButton } from "@/components/forms/submit-button";
import { Button } from "@/components/ui/button";
import { TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { SheetSection } from "@/components/ui/sheet";
import { Head, Table } from "@/components/ui/table";
import type { Role } from "@/lib/domain/roles";

const FORM_ID = "sign-in-form";
const WRONG =
  "This e-mail address and password do not fit together, or the person is no longer active. Check both and try again.";
const FAILED =
  "Signing in failed on the server. Try again in a moment, and tell your administrator if it stays so.";
const UNREACHABLE = "Keepstep was not reached. Check the connection and try again.";

/** What the server says about a refused sign-in; it never tells an unknown address from a wrong password. */
function sentenceFor(error: string): string {
  if (error === "CredentialsSignin") return WRONG;
  return error.startsWith("Too many wrong passwords") ? error : FAILED;
}

/** The reason why the sign-in was refused, or null once the session's cookie is set. */
async function trySignIn(form: HTMLFormElement): Promise<string | null> {
  const data = new FormData(form);
  const credentials = { email: data.get("email"), password: data.get("password") };
  try {
    const answer = await signIn("credentials", { ...credentials, redirect: false });
    return answer?.error ? sentenceFor(answer.error) : null;
  } catch {
    return UNREACHABLE;
  }
}

export function SignInForm({ next }: { readonly next: string }) {
  const [refusal, setRefusal] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  const submit = async (event: FormEvent<HTMLFormElement>): Promise<void> => {
    event.preventDefault();
    setBusy(true);
    const refused = await trySignIn(event.currentTarget);
    setRefusal(refused);
    if (refused === null) window.location.assign(next);
    else setBusy(false);
  };
  return (
    <form id={FORM_ID} onSubmit={(event) => void submit(event)}>
      {refusal !== null && (
        <div className="mb-4">
          <Notice title="Not signed in" live="alert">
            <p>{refusal}</p>
          </Notice>
        </div>
      )}
      <TextField
        label="E-mail address"
        name="email"
        type="email"
        autoComplete="username"
        required
        autoFocus
      />
      <TextField
        label="Password"
        name="password"
        type="password"
        autoComplete="current-password"
        maxLength={200}
        required
      />
      <div className="acts">
        <SubmitButton busy={busy}>Sign in</SubmitButton>
      </div>
    </form>
  );
}

interface DemoSignIn {
  readonly role: Role;
  readonly name: string;
  readonly email: string;
  readonly password: string;
}

function fillForm({ email, password }: DemoSignIn): void {
  const form = document.getElementById(FORM_ID);
  if (!(form instanceof HTMLFormElement)) return;
  const fill = (name: string, value: string): void => {
    const input = form.elements.namedItem(name);
    if (input instanceof HTMLInputElement) input.value = value;
  };
  fill("email", email);
  fill("password", password);
  form.querySelector<HTMLButtonElement>("button[type=submit]")?.focus();
}

/** The demo fleet's sign-ins, one or more a role; a press fills the form. */
export function DemoSignIns({ people }: { readonly people: readonly DemoSignIn[] }) {
  if (people.length === 0) return null;
  return (
    <SheetSection title="Demo sign-ins" note="This desk holds an invented fleet. Anybody may look around.">
      <Table caption="Demo sign-ins" captionHidden>
        <thead>
          <tr>
            <Head>Role</Head>
            <Head>Person</Head>
            <Head>Password</Head>
            <Head>
              <span className="visually-hidden">Fill the form</span>
            </Head>
          </tr>
        </thead>
        <tbody>
          {people.map((person) => (
            <tr key={person.email}>
              <td>{person.role}</td>
              <td>
                {person.name}
                <br />
                <span className="code">{person.email}</span>
              </td>
              <td>
                <span className="code">{person.password}</span>
              </td>
              <td>
                <Button
                  onClick={() => fillForm(person)}
                  aria-label={`Fill in ${person.name}, ${person.role}`}
                >
                  Fill in
                </Button>
              </td>
            </tr>
          ))}
        </tbody>
      </Table>
    </SheetSection>
  );
}
