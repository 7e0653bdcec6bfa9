const { request } = require('node:http');

const { getDefaultConfig } = require('expo/metro-config');

const config = getDefaultConfig(__dirname);

/** While developing, the pages come from Metro and the interface from the server beside it. */
config.server.enhanceMiddleware = (metro) => (req, res, next) =>
  req.url.startsWith('/api/') ? passOn(req, res) : metro(req, res, next);

function passOn(req, res) {
  const { method, headers, url: path } = req;
  const onward = request(
    { host: 'localhost', port: process.env.PORT ?? 4310, method, headers, path },
    (reply) => {
      res.writeHead(reply.statusCode, reply.headers);
      reply.pipe(res);
    },
  );
  onward.on('error', () => res.writeHead(502).end('The server does not answer.'));
  res.on('close', () => onward.destroy());
  req.pipe(onward);
}

module.exports = config;
