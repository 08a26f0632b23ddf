// While developing, the client's own server passes on what belongs to Fettle's server, wherever PORT puts that.
const target = `http://127.0.0.1:${process.env['PORT'] ?? '4300'}`;

export default {
  '/api': { target, changeOrigin: false },
};
