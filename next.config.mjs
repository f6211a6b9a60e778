/** @type {import("next").NextConfig} */
const config = {
  // These read files or load optional drivers at run time, so they stay outside the bundle.
  serverExternalPackages: ["sequelize", "pg", "pg-boss", "piscina", "@node-rs/argon2", "pino"],
  poweredByHeader: false,
  reactStrictMode: true,
  devIndicators: false,
  // `forbidden()`: a page that a role may not see answers 403, with a page of its own.
  experimental: { authInterrupts: true },
  // Types are checked by `npm test`, tests included; a start need not wait for them.
  typescript: { ignoreBuildErrors: true },
};

export default config;
