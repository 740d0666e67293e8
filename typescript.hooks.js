/**
 * Lets plain Node (from 22.18 on, which strips types by itself) run our TypeScript as it stands:
 * resolves './file' to './file.ts' and './folder' to './folder/index.ts'. Use: node --import ./typescript.hooks.js FILE
 */
import { existsSync, statSync } from 'node:fs';
import { registerHooks } from 'node:module';
import { fileURLToPath } from 'node:url';

registerHooks({
  resolve(specifier, context, nextResolve) {
    if (!specifier.startsWith('.') || context.parentURL === undefined) return nextResolve(specifier, context);
    const url = new URL(specifier, context.parentURL);
    const path = fileURLToPath(url);
    if (existsSync(`${path}.ts`)) return nextResolve(`${specifier}.ts`, context);
    if (existsSync(path) && statSync(path).isDirectory()) return nextResolve(`${specifier}/index.ts`, context);
    return nextResolve(specifier, context);
  },
});
