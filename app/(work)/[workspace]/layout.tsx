import { cookies } from "next/headers";
import Link from "next/link";
import type { ReactNode } from "react";
import { PaletteButton } from "@/app/_components/palette/palette-button";
import { PaletteProvider } from "@/app/_components/palette/palette-provider";
import { PlaceDeeds } from "@/app/_components/palette/place-deeds";
import { Logo } from "@/app/_components/ui/logo";
import { Providers } from "@/app/_components/ui/providers";
import { THEME_COOKIE, themeOf } from "@/app/_components/ui/theme";
import { DOCS_GROUPS } from "@/app/docs/_parts/pages";
import { GROUPS } from "@/app/docs/examples/groups";
import { actorFor } from "@/lib/auth/actor";
import { requestedPath } from "@/lib/auth/requested-path";
import { listWorkspaces } from "@/lib/services/workspaces/list-workspaces";
import { answered } from "../answered";
import { AccountMenu } from "./account-menu";
import { Navigation } from "./navigation";
import { NewsWatch } from "./news-watch";

/** What "Find or do…" offers to read. */
const READING = [
  { href: "/docs", title: "Reference", also: "documentation help" },
  ...DOCS_GROUPS.flatMap(({ title, pages }) =>
    pages.map(({ href, label, about }) => ({ href, title: label, also: `reference ${title} ${about}` })),
  ),
  ...GROUPS.flatMap(({ title, names }) =>
    names.map((name) => ({
      href: `/docs/examples/${name}`,
      title: `Example: ${name.replaceAll("-", " ")}`,
      also: title,
      onlyAsked: true,
    })),
  ),
];

interface Props {
  readonly children: ReactNode;
  readonly params: Promise<{ readonly workspace: string }>;
}

export default async function WorkspaceLayout({ children, params }: Props) {
  const { workspace } = await params;
  const actor = await answered(actorFor(workspace), await requestedPath(`/${workspace}`));
  const workspaces = await listWorkspaces(actor);
  const theme = themeOf((await cookies()).get(THEME_COOKIE)?.value);
  return (
    <Providers>
      <PaletteProvider workspace={workspace}>
        <PlaceDeeds workspace={workspace} reading={READING} />
        <NewsWatch workspace={workspace} />
        <div className="flex min-h-dvh flex-col">
          <a
            href="#content"
            className="sr-only z-50 bg-surface px-3 py-2 focus:not-sr-only focus:absolute focus:top-2 focus:left-2"
          >
            Skip to the content
          </a>
          <header className="flex h-13 items-center gap-4 border-b px-4 md:gap-6 md:px-6" data-print="never">
            <Link
              href={`/${workspace}`}
              className="flex min-h-8 items-center gap-2.5"
              aria-label="Sweepwright, home"
            >
              <Logo />
              <span className="hidden font-bold tracking-tight sm:inline">Sweepwright</span>
            </Link>
            <Navigation workspace={workspace} />
            <div className="ml-auto flex items-center gap-3">
              <PaletteButton />
              <Link
                href="/docs"
                className="hidden min-h-8 items-center text-quiet text-sm hover:text-ink md:inline-flex"
              >
                Reference
              </Link>
              <span className="hidden text-quiet text-sm lg:inline">
                {workspaces.find(({ slug }) => slug === workspace)?.name}
              </span>
              <AccountMenu
                name={actor.name}
                email={actor.email}
                role={actor.role}
                workspace={workspace}
                workspaces={workspaces}
                theme={theme}
              />
            </div>
          </header>
          <main id="content" tabIndex={-1} className="flex grow flex-col outline-none">
            {children}
          </main>
          {workspace === "north-bench" && (
            <footer className="border-t px-4 py-2 text-quiet text-xs md:px-6">
              Demo data: Northbench Instruments and its people are invented.
            </footer>
          )}
        </div>
      </PaletteProvider>
    </Providers>
  );
}
