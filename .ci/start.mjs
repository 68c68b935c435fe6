// npm start: from a fresh clone to the running demo. Node built-ins only, for nothing is installed yet.
import { build } from './build.mjs';
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

await runProduct(async (family) => {
  const settings = settingsFrom();
  await requirePort(settings);
  await ensureModules();
  for (const { name, built, seconds } of await build()) {
    if (built) console.log(`Built the ${name} in ${seconds.toFixed(1)} s.`);
  }
  console.log('Starting. A new data folder is first filled with the demo.');
  const services = await startServices(family, ['dist/api/demo/services.js'], settings.dataDir);
  const env = apiEnvironment(settings, services);
  const api = family.start(
    'server',
    ['--enable-source-maps', '--import', './.ci/leash.mjs', 'dist/api/main.js'],
    {
      env,
    },
  );
  await waitUntilReady(settings.address, () => api.exitCode === null && api.signalCode === null);
  await announce(settings.address, services.mailPage ?? '', settings.dataDir);
});
