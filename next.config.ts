import type { NextConfig } from "next";

/** `npm test` builds into a folder of its own, so that a running demo keeps its pages. */
const distDir = process.env.SWEEPWRIGHT_DIST || ".next";

/** On every answer; the content policy, which needs a nonce per page, is set in proxy.ts. */
const HEADERS = [
  { key: "X-Content-Type-Options", value: "nosniff" },
  { key: "X-Frame-Options", value: "DENY" },
  { key: "Referrer-Policy", value: "strict-origin-when-cross-origin" },
  { key: "Permissions-Policy", value: "camera=(), geolocation=(), microphone=(), payment=(), usb=()" },
  { key: "Cross-Origin-Opener-Policy", value: "same-origin" },
];

/** The API answers data, never a page: whatever a browser makes of it can load and run nothing. */
const API_HEADERS = [
  { key: "Content-Security-Policy", value: "default-src 'none'; base-uri 'none'; frame-ancestors 'none'" },
];

const config: NextConfig = {
  distDir,
  poweredByHeader: false,
  reactStrictMode: true,
  // No picture here needs Next.js's service that fetches and scales pictures for whoever asks.
  images: { unoptimized: true },
  // Packages that must stay as they are on disk: they load files of their own or are native.
  serverExternalPackages: [
    "pg",
    "bullmq",
    "ioredis",
    "ioredis-mock",
    "@node-rs/argon2",
    "rate-limiter-flexible",
  ],
  typescript: {
    // `npm test` checks the types of the whole tree; a build need not check them again.
    ignoreBuildErrors: true,
    ...(distDir === ".next" ? {} : { tsconfigPath: ".test/tsconfig.json" }),
  },
  headers: async () => [
    { source: "/:path*", headers: HEADERS },
    { source: "/api/:path*", headers: API_HEADERS },
  ],
};

export default config;
