import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { Notice } from "@/app/_components/ui/notice";
import { currentUser } from "@/lib/auth/actor";
import { listWorkspaces } from "@/lib/services/workspaces/list-workspaces";
import { localPath } from "./local-path";
import { SignInForm } from "./sign-in-form";

export const metadata: Metadata = { title: "Sign in" };

interface Props {
  readonly searchParams: Promise<{ readonly next?: string | string[] }>;
}

export default async function SignInPage({ searchParams }: Props) {
  const next = localPath((await searchParams).next);
  const user = await currentUser();
  if (user !== null) {
    const [first] = await listWorkspaces(user);
    if (next !== null) redirect(next);
    if (first !== undefined) redirect(`/${first.slug}`);
    return (
      <Notice tone="caution" title="You are signed in, but a member of no workspace">
        <p>Ask an admin of your team to add {user.email} to its workspace, then load this page again.</p>
      </Notice>
    );
  }
  return (
    <>
      <h1 className="text-2xl">Sign in</h1>
      {next !== null && <p className="mt-1 text-quiet text-sm">You come back to where you were.</p>}
      <div className="mt-6">
        <SignInForm />
      </div>
    </>
  );
}
