/** One bundle of the API for Node; npm packages stay outside it, workspace packages go in as source. */
export default {
  root: import.meta.dirname,
  publicDir: false,
  build: {
    ssr: 'src/main.ts',
    outDir: '../../dist/api',
    emptyOutDir: true,
    target: 'node20',
    minify: false,
    sourcemap: false,
  },
  ssr: { noExternal: [/^@trammel\//] },
};
