/** Names of columns as exports bear them, in the four languages of the report. In: a name. Out: our column, or null. Never a name that means two things. */
import type { Column } from './mapping.ts';

const WORDS: Partial<Record<Column, readonly string[]>> = {
  machine: [
    'machine',
    'machine id',
    'machine name',
    'asset',
    'asset id',
    'asset name',
    'equipment',
    'equipment id',
    'tag',
    'tag no',
    'maschine',
    'anlage',
    'aggregat',
    'maschinen-nr',
    'equipo',
    'máquina',
    'maquina',
    'activo',
    'équipement',
    'equipement',
    'repère',
  ],
  point: [
    'point',
    'point id',
    'point name',
    'measurement point',
    'measuring point',
    'meas point',
    'position',
    'pos',
    'place',
    'bearing',
    'messpunkt',
    'messstelle',
    'messort',
    'punkt',
    'lager',
    'lagerstelle',
    'punto',
    'punto de medida',
    'punto de medición',
    'posición',
    'rodamiento',
    'cojinete',
    'point de mesure',
    'palier',
  ],
  direction: ['direction', 'axis', 'dir', 'richtung', 'messrichtung', 'dirección', 'direccion', 'eje', 'axe', 'sens'],
  value: [
    'value',
    'reading',
    'overall',
    'level',
    'amplitude',
    'overall value',
    'wert',
    'messwert',
    'gesamtwert',
    'kennwert',
    'valor',
    'lectura',
    'nivel',
    'valor global',
    'valeur',
    'mesure',
    'niveau',
    'valeur globale',
    'niveau global',
  ],
  unit: ['unit', 'units', 'uom', 'einheit', 'einheiten', 'unidad', 'unidades', 'unité', 'unités', 'unite'],
  detection: ['detection', 'signal detection', 'detektion', 'detección', 'deteccion', 'détection'],
  quantity: ['quantity', 'parameter', 'measurement type', 'messgröße', 'größe', 'magnitud', 'parámetro', 'grandeur', 'paramètre'],
  taken_at: [
    'taken_at',
    'taken at',
    'date',
    'date/time',
    'date time',
    'datetime',
    'timestamp',
    'time stamp',
    'measured on',
    'measured at',
    'when',
    'datum',
    'datum/zeit',
    'messdatum',
    'zeitpunkt',
    'fecha',
    'fecha y hora',
    'fecha de medición',
    'date de mesure',
    'date et heure',
    'horodatage',
  ],
  status: ['status', 'zustand', 'estado', 'état', 'statut'],
  remark: [
    'remark',
    'remarks',
    'note',
    'notes',
    'comment',
    'comments',
    'bemerkung',
    'bemerkungen',
    'kommentar',
    'observaciones',
    'observación',
    'comentario',
    'remarque',
    'remarques',
    'commentaire',
  ],
  instrument: ['instrument', 'collector', 'messgerät', 'gerät', 'instrumento', 'appareil'],
  measured_by: [
    'measured by',
    'analyst',
    'operator',
    'technician',
    'prüfer',
    'messtechniker',
    'técnico',
    'medido por',
    'technicien',
    'mesuré par',
  ],
  survey_date: ['survey', 'survey date', 'route date'],
};

const BY_WORD = new Map<string, Column>();
for (const [column, words] of Object.entries(WORDS)) for (const word of words) BY_WORD.set(word, column as Column);

const fold = (name: string): string =>
  name
    .normalize('NFC')
    .toLowerCase()
    .replace(/\s*[([].*$/, '')
    .replace(/[_\s]+/g, ' ')
    .replace(/[.:]+$/, '')
    .trim();

/** A speed only where its unit stands by it. */
const SPEED = /(?:speed|drehzahl|velocidad|vitesse|^)\W*\(?(?:rpm|r\/min|1\/min|min-1|u\/min|tr\/min)\)?$/i;

export function columnOfName(name: string): Column | null {
  if (name.length > 100) return null;
  return SPEED.test(name.trim()) ? 'speed_rpm' : (BY_WORD.get(fold(name)) ?? null);
}

const DIRECTIONS: Readonly<Record<'horizontal' | 'vertical' | 'axial' | 'radial', readonly string[]>> = {
  horizontal: ['h', 'hor', 'horiz', 'horizontal'],
  vertical: ['v', 'ver', 'vert', 'vertikal', 'vertical'],
  axial: ['a', 'ax', 'axial'],
  radial: ['r', 'rad', 'radial'],
};

export function directionOfName(name: string): 'horizontal' | 'vertical' | 'axial' | 'radial' | null {
  const word = fold(name);
  return (['horizontal', 'vertical', 'axial', 'radial'] as const).find((direction) => DIRECTIONS[direction].includes(word)) ?? null;
}

const QUANTITIES: ReadonlyMap<string, string> = new Map([
  ...['vel', 'velocity', 'schwinggeschwindigkeit', 'geschwindigkeit', 'velocidad', 'vitesse'].map((word) => [word, 'velocity'] as const),
  ...['disp', 'displacement', 'schwingweg', 'weg', 'desplazamiento', 'déplacement'].map((word) => [word, 'displacement'] as const),
  ...['acc', 'accel', 'acceleration', 'beschleunigung', 'schwingbeschleunigung', 'aceleración', 'accélération'].map(
    (word) => [word, 'acceleration'] as const,
  ),
]);

export const quantityOfWord = (text: string): string | null => QUANTITIES.get(fold(text)) ?? null;
