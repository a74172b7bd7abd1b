/** @type {import('next').NextConfig} */
const nextConfig = {
  reactStrictMode: true,
  poweredByHeader: false,
  agentRules: false,
  distDir: process.env.KEEPSTEP_DIST_DIR ?? ".next",
  outputFileTracingRoot: import.meta.dirname,
  turbopack: { root: import.meta.dirname },
  serverExternalPackages: ["sequelize", "pg-boss", "nodemailer", "umzug"],
  experimental: { turbopackFileSystemCacheForBuild: false },
};
export default nextConfig;
