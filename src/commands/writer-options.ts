/** The options that `report` and `render` share: what is written, and what is told about it. */
import { type Argument, jsonOption } from './command.ts';

export const writerOptions: Readonly<Record<string, Argument>> = {
  brief: { describe: "in the PDF the manager's page and the list only", type: 'boolean' },
  'single-file': { describe: 'the site as one HTML file to mail, site/index.html', type: 'boolean' },
  machine: { describe: 'one machine only', type: 'string' },
  tags: { describe: 'tag the PDF for assistive technology; --no-tags leaves it out', type: 'boolean', default: true },
  json: jsonOption,
  quiet: { describe: 'say nothing but errors', type: 'boolean' },
};
