/**
 * Compiles the schemas of schema/ to shared/formats/validators.js. Run after a change of a schema:
 * `tsx api/cli/make-validators.ts`. A test checks that the file is up to date.
 */
import { writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { validatorModule } from '#api/lib/validator-source.ts';

writeFileSync(fileURLToPath(new URL('../../shared/formats/validators.js', import.meta.url)), await validatorModule());
