"use client";

import { useRouter } from "next/navigation";
import { signIn } from "next-auth/react";
import { type FormEvent, useState } from "react";
import { Button } from "@/app/_components/ui/button";
import { Field } from "@/app/_components/ui/field";
import { Notice } from "@/app/_components/ui/notice";
import { refusal } from "./refusal";

/** E-mail and password. Once the session stands, the page is asked anew and sends the reader on. */
export function SignInForm() {
  const router = useRouter();
  const [problem, setProblem] = useState<string>();
  const [checking, setChecking] = useState(false);

  const submit = async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = new FormData(event.currentTarget);
    const email = String(form.get("email") ?? "").trim();
    const password = String(form.get("password") ?? "");
    if (email === "" || password === "") {
      setProblem("Give both your e-mail address and your password.");
      return;
    }
    setChecking(true);
    setProblem(undefined);
    try {
      const answer = await signIn("credentials", { email, password, redirect: false });
      if (answer?.ok === true && !answer.error) {
        router.refresh();
        return;
      }
      setProblem(refusal(answer?.error));
    } catch {
      setProblem("The service did not answer. Check your connection and try again.");
    }
    setChecking(false);
  };

  return (
    <form method="post" onSubmit={submit} noValidate className="grid gap-4">
      {problem !== undefined && (
        <Notice tone="broken" announce>
          <p>{problem}</p>
        </Notice>
      )}
      <Field label="E-mail" name="email" type="email" autoComplete="username" required spellCheck={false} />
      <Field label="Password" name="password" type="password" autoComplete="current-password" required />
      <Button tone="primary" type="submit" busy={checking} className="mt-2 min-h-10">
        {checking ? "Checking…" : "Sign in"}
      </Button>
    </form>
  );
}
