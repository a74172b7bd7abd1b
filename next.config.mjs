/** @type {import('next').NextConfig} */
const nextConfig = {
  reactStrictMode: true,
  poweredByHeader: false,
  agentRules: false,
  distDir: process.env.KEEPSTEP_DIST_DIR ?? ".next",
  typescript: {
    tsconfigPath: process.env.KEEPSTEP_TSCONFIG ?? "tsconfig.json",
    ignoreBuildErrors: process.env.KEEPSTEP_TYPES_PROVEN === "1",
  },
  outputFileTracingRoot: import.meta.dirname,
  turbopack: { root: import.meta.dirname },
  serverExternalPackages: ["sequelize", "pg-boss", "nodemailer", "umzug"],
  experimental: { turbopackFileSystemCacheForBuild: false },
};
export default nextConfig;
