/** @type {import('next').NextConfig} */
const config = {
  reactStrictMode: true,
  poweredByHeader: false,
  agentRules: false,
  experimental: { authInterrupts: true },
  // These read files beside themselves at run time or break when bundled.
  serverExternalPackages: ['pdfkit', 'exceljs', 'pg-boss', 'pg', '@node-rs/argon2', 'pino', 'nodemailer'],
};
export default config;
