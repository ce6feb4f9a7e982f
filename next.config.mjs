/** @type {import('next').NextConfig} */
const config = {
  reactStrictMode: true,
  poweredByHeader: false,
  agentRules: false,
  experimental: { authInterrupts: true },
  // The test run checks types (and tests' and scripts' too); a start need not wait for it.
  typescript: { ignoreBuildErrors: true },
  // These read files beside themselves at run time or break when bundled.
  serverExternalPackages: ['pdfkit', 'exceljs', 'pg-boss', 'pg', '@node-rs/argon2', 'pino', 'nodemailer'],
};
export default config;
