// Runs the command, which is TypeScript, through Vite: npm run draw -- FILE.pdf PAGE
import { runnerImport } from 'vite';

await runnerImport(new URL('draw-command.ts', import.meta.url).pathname, {
  configFile: false,
  logLevel: 'error',
});
