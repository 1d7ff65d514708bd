/** Run by scripts/measured-checks-plugin.js in a process of its own: the report goes to standard output. */
import { measureAll } from './report';

process.stdout.write(JSON.stringify(measureAll('thinned', new Date().toISOString())));
