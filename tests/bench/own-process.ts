/** One estimate in a process of its own, from a dataset file: `tsx tests/bench/own-process.ts FILE REPLICATES`. Prints seconds and peak memory as JSON. */
import { readFileSync } from 'node:fs';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { contentIdOf } from '#shared/formats/canonical-json.ts';
import type { Dataset } from '#shared/formats/types.ts';
import { estimate } from '#shared/method/estimate.ts';

const [file, replicates] = process.argv.slice(2);
const start = performance.now();
const dataset = JSON.parse(readFileSync(file!, 'utf8')) as Dataset;
estimate({ dataset, contentId: contentIdOf(dataset), gateClass: gateClassById(dataset.gateClass), replicates: Number(replicates) });
console.log(JSON.stringify({ seconds: (performance.now() - start) / 1000, mebibytes: process.resourceUsage().maxRSS / 1024 }));
