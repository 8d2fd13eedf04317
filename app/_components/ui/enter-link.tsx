import { ButtonLink, type ButtonTone } from "./button";

/** The way to the work from pages that are open to everyone. On a telephone it has room for one word beside the mark. */
export function EnterLink({
  isSignedIn,
  tone = "plain",
}: {
  readonly isSignedIn: boolean;
  readonly tone?: ButtonTone;
}) {
  return (
    <ButtonLink href="/sign-in" tone={tone}>
      {isSignedIn ? (
        <>
          <span className="sm:hidden">Workspace</span>
          <span className="hidden sm:inline">Open your workspace</span>
        </>
      ) : (
        "Sign in"
      )}
    </ButtonLink>
  );
}
