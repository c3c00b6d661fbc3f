/** `render`: the report again from a record. In: record.json. Out: what `report` wrote, byte for byte where the plant still stands around it. Never assesses. */
import { UserError, type Shell } from '../shell/types.ts';
import type { Command } from './command.ts';
import { writerOptions } from './writer-options.ts';

export const render: Command = {
  usage: 'render <record>',
  describe: 'write the report again from its record.json',
  positionals: { record: { describe: 'a record.json', type: 'string' } },
  options: { out: { describe: 'output folder: new, empty or made by swayfolio', type: 'string', demandOption: true }, ...writerOptions },
  async run(given, { shell }) {
    const { record: path = '', out = '' } = given;
    shell.claimFolder(out);
    const text = utf8(shell.read(path), path);
    const { deliver } = await import('./deliver.ts');
    const { loadAssets } = await import('../shell/assets.ts');
    const { writeDelivery } = await import('./written.ts');
    const delivery = await deliver(text, loadAssets(plantAround(path, shell)), given, shell.progress);
    writeDelivery(delivery, out, given, shell);
    return 0;
  },
};

function utf8(bytes: Uint8Array, path: string): string {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    throw new UserError(`${path} is not UTF-8 text.`, 'Give the record.json that swayfolio wrote.');
  }
}

/** Photos and attachments are in no record: they come from the nearest folder above it that is a plant, if there is one. */
function plantAround(path: string, shell: Shell): string | null {
  const parts = shell.absolute(path).split('/');
  for (let depth = parts.length - 1; depth > 0; depth -= 1) {
    const folder = parts.slice(0, depth).join('/');
    if (shell.exists(`${folder}/plant.yaml`)) return folder;
  }
  return null;
}
