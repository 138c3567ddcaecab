import { draw } from './draw.ts';

// npm runs scripts in the package's folder; files are named from where the command was given
const folder = process.env['INIT_CWD'] ?? process.cwd();
console.log(await draw(process.argv.slice(2), folder));
