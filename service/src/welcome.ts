import type { Config } from './config';

/** What a start prints: where everything is. */
export function welcome(config: Config): string {
  return [
    '',
    `  Console         ${config.publicUrl}/`,
    `  Documentation   ${config.publicUrl}/docs`,
    `  Estimates       ${config.publicUrl}/v1`,
    `  Partner's page  ${config.partnerPageUrl}/`,
    '',
  ].join('\n');
}
