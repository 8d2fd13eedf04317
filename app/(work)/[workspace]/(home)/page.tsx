import type { Metadata } from "next";
import { ButtonLink } from "@/app/_components/ui/button";
import { counted } from "@/app/_components/ui/count";
import { PageHeader } from "@/app/_components/ui/page-header";
import { EmptyState } from "@/app/_components/ui/states";
import { actorFor } from "@/lib/auth/actor";
import { getHome } from "@/lib/services/workspaces/get-home";
import { answered } from "../../answered";
import { Attention } from "./attention";
import { KeepCurrent } from "./keep-current";
import { RecentRuns } from "./recent-runs";

export const metadata: Metadata = { title: "Home" };

interface Props {
  readonly params: Promise<{ readonly workspace: string }>;
}

export default async function HomePage({ params }: Props) {
  const { workspace } = await params;
  const path = `/${workspace}`;
  const actor = await answered(actorFor(workspace), path);
  const home = await answered(getHome(actor), path);
  const { counts } = home;
  return (
    <>
      <PageHeader
        title="Home"
        remark={`${counted(counts.netlists, "netlist")}, ${counted(counts.runs, "run")}`}
        actions={<ButtonLink href={`${path}/netlists`}>All netlists</ButtonLink>}
      />
      <KeepCurrent moving={home.running.length > 0} />
      {counts.netlists === 0 ? (
        <div className="px-4 py-8 md:px-6">
          <EmptyState
            title="This workspace is empty"
            action={
              <div className="flex flex-wrap gap-3">
                <ButtonLink tone="primary" href={`${path}/netlists`}>
                  Go to netlists
                </ButtonLink>
                <ButtonLink href="/docs/tour">Take the five-minute tour</ButtonLink>
              </div>
            }
          >
            <p>
              Make a netlist or upload .swn files; what needs attention will then stand here. The tour makes a
              first one with you.
            </p>
          </EmptyState>
        </div>
      ) : (
        <div className="grid items-start gap-x-10 gap-y-10 px-4 py-6 md:px-6 lg:grid-cols-[minmax(0,2fr)_minmax(0,3fr)]">
          <Attention workspace={workspace} failing={home.failing} running={home.running} />
          <RecentRuns workspace={workspace} runs={home.recentRuns} />
        </div>
      )}
    </>
  );
}
