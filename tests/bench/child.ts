/** A process of its own that computes one year and says, in JSON, what memory it needed at its peak. */
import { shadeYear } from '../../src/lib/core';
import { alikeField } from './fields';

const count = Number(process.argv[2]);
const began = performance.now();
const result = shadeYear(alikeField('regular', count));
const clockMs = performance.now() - began;
if (result?.trackers.length !== count) throw new Error('The year was not computed.');
// maxRSS comes in kilobytes.
console.log(JSON.stringify({ clockMs, peakMb: process.resourceUsage().maxRSS / 1024 }));
