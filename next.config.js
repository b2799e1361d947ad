/** @type {import('next').NextConfig} */
export default {
  // Tests and trials build into a folder of their own, so that a running server keeps its files.
  distDir: process.env.NEXT_DIST || '.next',
  reactStrictMode: true,
  poweredByHeader: false,
  // `npm run check` runs the type checker over everything; a build need not do it again.
  typescript: { ignoreBuildErrors: true },
  // Native parts and worker threads must be loaded from node_modules as they are.
  serverExternalPackages: ['piscina', 'libsql', '@libsql/client', '@prisma/client', '@prisma/adapter-libsql'],
  devIndicators: false,
  agentRules: false,
};
