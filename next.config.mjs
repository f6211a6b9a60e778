/** @type {import("next").NextConfig} */
const config = {
  // These read files or load optional drivers at run time, so they stay outside the bundle.
  serverExternalPackages: ["sequelize", "pg", "pg-boss", "piscina", "@node-rs/argon2", "pino"],
  poweredByHeader: false,
  reactStrictMode: true,
  devIndicators: false,
  // Types are checked by `npm test`, tests included; a start need not wait for them.
  typescript: { ignoreBuildErrors: true },
};

export default config;
