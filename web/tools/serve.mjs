// Serves the single file on this machine alone, for those who rather open an address than a file.
//
//   node web/tools/serve.mjs <the single file> [port]
import { readFileSync } from 'node:fs';
import { createServer } from 'node:http';

const [file, port = '8046'] = process.argv.slice(2);
const page = readFileSync(file);

const server = createServer((request, response) => {
  if (request.url === '/' && (request.method === 'GET' || request.method === 'HEAD')) {
    response.writeHead(200, {
      'content-type': 'text/html; charset=utf-8',
      'content-length': page.length,
      'cache-control': 'no-store',
      'x-content-type-options': 'nosniff',
    });
    response.end(request.method === 'HEAD' ? undefined : page);
  } else {
    response.writeHead(404).end();
  }
});
server.on('error', (error) => {
  console.error(`Cannot serve on 127.0.0.1:${port}: ${error.message}`);
  process.exit(1);
});
server.listen(Number(port), '127.0.0.1', () => console.log(`http://127.0.0.1:${server.address().port}/`));
