import { ButtonLink } from "@/app/_components/ui/button";
import { EmptyState } from "@/app/_components/ui/states";

export default function NotFound() {
  return (
    <div className="px-4 py-8 md:px-6">
      <h1 className="sr-only">Not found</h1>
      <EmptyState
        title="There is no such page in this workspace"
        action={<ButtonLink href="/">Go to the start</ButtonLink>}
      >
        <p>It may have been moved or archived, or it belongs to a workspace you are not a member of.</p>
      </EmptyState>
    </div>
  );
}
