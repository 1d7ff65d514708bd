/** A process of its own that computes one year and says, in JSON, what memory it needed at its peak. */
import { readFileSync } from 'node:fs';
import { shadeYear } from '../../src/lib/core';
import { alikeField } from './fields';

const count = Number(process.argv[2]);
const began = performance.now();
const result = shadeYear(alikeField('regular', count));
const clockMs = performance.now() - began;
if (result?.trackers.length !== count) throw new Error('The year was not computed.');
// The process's own peak: what `resourceUsage` tells begins with the size of the process that started it.
const peak = /VmHWM:\s+(\d+) kB/.exec(readFileSync('/proc/self/status', 'utf8'));
const peakKb = peak ? Number(peak[1]) : process.resourceUsage().maxRSS;
console.log(JSON.stringify({ clockMs, peakMb: peakKb / 1024 }));
