import express, { type Express, type RequestHandler } from 'express';

/** Serves the built pages: files whose names carry their hash for ever, the page itself never from a cache. */
export function mountWeb(app: Express, webRoot: string): void {
  app.use(
    '/assets',
    express.static(`${webRoot}/assets`, { immutable: true, maxAge: '1y', fallthrough: false, index: false }),
  );
  app.use(express.static(webRoot, { index: false, maxAge: 0 }));
  app.use(pageFor(webRoot));
}

/** Every other address is one of the page's own; it finds out itself which are not. */
function pageFor(webRoot: string): RequestHandler {
  return function servePage(request, response, next) {
    if (request.method !== 'GET' && request.method !== 'HEAD') return next();
    response.sendFile('index.html', { root: webRoot, cacheControl: false, headers: { 'Cache-Control': 'no-cache' } });
  };
}
