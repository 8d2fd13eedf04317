"use client";

import { signOut } from "next-auth/react";
import { useState } from "react";
import { useDeeds } from "@/app/_components/palette/deed-registry";
import { Menu, MenuChoice, MenuItem, MenuLabel, MenuLink, MenuSeparator } from "@/app/_components/ui/menu";
import { THEME_COOKIE, type Theme } from "@/app/_components/ui/theme";

const THEMES = [
  { value: "system", label: "As the system" },
  { value: "light", label: "Light" },
  { value: "dark", label: "Dark" },
] as const satisfies readonly { value: Theme; label: string }[];

/** Shows a theme at once and keeps it for a year, where the next page's first byte will find it. */
function keepTheme(theme: Theme): void {
  if (theme === "system") delete document.documentElement.dataset.theme;
  else document.documentElement.dataset.theme = theme;
  // biome-ignore lint/suspicious/noDocumentCookie: the Cookie Store API is not in every browser we serve
  document.cookie = `${THEME_COOKIE}=${theme}; path=/; max-age=31536000; samesite=lax`;
}

/** Who is signed in and as what; the other workspaces; light or dark; the way out. */
export function AccountMenu({
  name,
  email,
  role,
  workspace,
  workspaces,
  theme: kept,
}: {
  readonly name: string;
  readonly email: string;
  readonly role: string;
  readonly workspace: string;
  readonly workspaces: readonly { readonly slug: string; readonly name: string }[];
  readonly theme: Theme;
}) {
  const [theme, setTheme] = useState(kept);
  const initials = name
    .split(/\s+/)
    .map((word) => word.charAt(0))
    .slice(0, 2)
    .join("")
    .toUpperCase();
  const others = workspaces.filter(({ slug }) => slug !== workspace);
  const choose = (next: Theme) => {
    setTheme(next);
    keepTheme(next);
  };
  const leave = () => void signOut({ callbackUrl: "/sign-in" });
  useDeeds("self", [
    ...THEMES.filter(({ value }) => value !== theme).map(({ value, label }) => ({
      id: `theme ${value}`,
      words: value === "system" ? "Theme as the system" : `${label} theme`,
      also: "theme colours appearance light dark",
      does: () => choose(value),
    })),
    ...others.map(({ slug, name: other }) => ({
      id: `workspace ${slug}`,
      words: `Workspace ${other}`,
      also: "switch team",
      does: `/${slug}`,
    })),
    { id: "leave", words: "Sign out", also: "log off leave", does: leave },
  ]);
  return (
    <Menu
      trigger={
        <button
          type="button"
          aria-label={`Account of ${name}`}
          className="flex size-8 items-center justify-center rounded-[2px] border text-quiet text-xs hover:border-edge hover:text-ink"
        >
          {initials}
        </button>
      }
    >
      <div className="px-2 pt-1.5 pb-1">
        <p className="font-semibold text-sm">{name}</p>
        <p className="break-all text-quiet text-xs">{email}</p>
        <p className="text-quiet text-xs">{role} in this workspace</p>
      </div>
      {others.length > 0 && (
        <>
          <MenuSeparator />
          <MenuLabel>Other workspaces</MenuLabel>
          {others.map(({ slug, name: other }) => (
            <MenuLink key={slug} href={`/${slug}`}>
              {other}
            </MenuLink>
          ))}
        </>
      )}
      <MenuSeparator />
      <MenuLabel>Theme</MenuLabel>
      <MenuChoice value={theme} options={THEMES} onChange={choose} />
      <MenuSeparator />
      <MenuLink href="/docs">Reference</MenuLink>
      <MenuItem onSelect={leave}>Sign out</MenuItem>
    </Menu>
  );
}
