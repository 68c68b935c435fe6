// npm run dev: the same product with hot reload, the portal by Vite and the API by tsx.
import { ensureModules } from './modules.mjs';
import {
  announce,
  apiEnvironment,
  requirePort,
  runProduct,
  settingsFrom,
  startServices,
  waitUntilReady,
} from './product.mjs';

const tsx = 'node_modules/tsx/dist/cli.mjs';

await runProduct(async (family) => {
  const settings = settingsFrom();
  const portal = { host: '127.0.0.1', port: Number(process.env.PORTAL_PORT || 4181) };
  const portalAddress = `http://${portal.host}:${portal.port}`;
  await requirePort(settings);
  await requirePort(portal, 'PORTAL_PORT');
  await ensureModules();
  const services = await startServices(family, [tsx, 'apps/api/src/demo/services.ts'], settings.dataDir);
  const env = { ...apiEnvironment(settings, services), PUBLIC_URL: portalAddress };
  family.start('server', [tsx, 'watch', '--clear-screen=false', 'apps/api/src/main.ts'], { env });
  family.start(
    'portal',
    ['node_modules/vite/bin/vite.js', '--host', portal.host, '--port', String(portal.port), '--strictPort'],
    { env: { ...process.env, TRAMMEL_API: settings.address } },
  );
  // A mistake in the code is mended while this waits: tsx starts the server again after the next change.
  await waitUntilReady(settings.address, () => true, 3_600_000);
  await announce(portalAddress, services.mailPage ?? '', settings.dataDir, settings.address);
});
