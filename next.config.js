/** @type {import("next").NextConfig} */
const config = {
  // Native modules and modules that load files of their own stay outside the bundle.
  serverExternalPackages: [
    "better-sqlite3",
    "@prisma/adapter-better-sqlite3",
    "@prisma/client",
    "@prisma/adapter-pg",
    "pg",
  ],
  poweredByHeader: false,
  // `npm test` checks types with tsc; a start on a fresh machine does not need to do it again.
  typescript: { ignoreBuildErrors: true },
  experimental: { serverActions: { bodySizeLimit: "4mb" } },
};

export default config;
