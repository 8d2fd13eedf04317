import { ButtonLink } from "@/app/_components/ui/button";
import { EmptyState } from "@/app/_components/ui/states";

export default function NotFound() {
  return (
    <div className="px-4 py-8 md:px-6">
      <h1 className="sr-only">No such netlist</h1>
      <EmptyState
        title="There is no such netlist in this workspace"
        action={<ButtonLink href="/">Go to your workspace</ButtonLink>}
      >
        <p>
          It may have been archived, the address may be cut off, or it belongs to a workspace you are not a
          member of.
        </p>
      </EmptyState>
    </div>
  );
}
