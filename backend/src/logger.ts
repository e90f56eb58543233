import { pino, type DestinationStream, type Logger } from 'pino';

const SECRETS = ['password', 'currentPassword', 'newPassword', 'passwordHash', 'token', 'csrfToken', 'secret'];

/** JSON lines on standard output. Request headers are not logged at all; this list catches what slips in otherwise. */
export function createLogger(level: string, destination?: DestinationStream): Logger {
  const paths = SECRETS.flatMap((name) => [name, `*.${name}`, `*.*.${name}`]);
  const headers = ['cookie', 'authorization', '["set-cookie"]', '["x-csrf-token"]'].flatMap((header) => {
    const key = header.startsWith('[') ? header : `.${header}`;
    return [`req.headers${key}`, `res.headers${key}`, `headers${key}`];
  });
  const options = { level, redact: { paths: [...paths, ...headers], censor: '[redacted]' } };
  return destination ? pino(options, destination) : pino(options);
}
