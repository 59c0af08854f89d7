import { pino, type Logger } from 'pino';

export type { Logger };

/** JSON lines on standard output, without credentials, cookies or what people wrote. */
export function createLogger(level: string, program: string): Logger {
  return pino({
    level,
    base: { program },
    redact: {
      paths: [
        'req.headers.cookie',
        'req.headers.authorization',
        'req.headers["x-xsrf-token"]',
        'res.headers["set-cookie"]',
        '*.password',
        '*.token',
      ],
      remove: true,
    },
  });
}
