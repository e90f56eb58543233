/** Whether this is `npm run test:long`, which walks and draws more than an ordinary run. */
export const IS_LONG = process.env['LONG'] === '1';
