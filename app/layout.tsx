import type { Metadata, Viewport } from "next";
import { cookies } from "next/headers";
import type { ReactNode } from "react";
import "./globals.css";
import { THEME_COOKIE, themeOf } from "./_components/ui/theme";

export const metadata: Metadata = {
  title: { default: "Sweepwright", template: "%s · Sweepwright" },
  description: "Proves log-domain analog circuits over decades of signal, temperature and part tolerance.",
};

export const viewport: Viewport = {
  themeColor: [
    { media: "(prefers-color-scheme: light)", color: "#fbfaf6" },
    { media: "(prefers-color-scheme: dark)", color: "#10161d" },
  ],
};

// The chosen theme stands in a cookie, so the first byte of the page carries it: no flash, and no script before the page.
export default async function RootLayout({ children }: { readonly children: ReactNode }) {
  const theme = themeOf((await cookies()).get(THEME_COOKIE)?.value);
  return (
    <html lang="en" data-theme={theme === "system" ? undefined : theme} suppressHydrationWarning>
      <body>{children}</body>
    </html>
  );
}
