import type { Words } from './words.ts';

/** One and many. */
export const englishKinds: Words['kinds'] = {
  'water-closet': ['water closet', 'water closets'],
  urinal: ['urinal', 'urinals'],
  lavatory: ['lavatory', 'lavatories'],
  sink: ['sink', 'sinks'],
  'kitchen-sink': ['kitchen sink', 'kitchen sinks'],
  'mop-sink': ['mop sink', 'mop sinks'],
  'laundry-tray': ['laundry tray', 'laundry trays'],
  shower: ['shower', 'showers'],
  bathtub: ['bathtub', 'bathtubs'],
  bidet: ['bidet', 'bidets'],
  'floor-drain': ['floor drain', 'floor drains'],
  'clothes-washer': ['clothes washer', 'clothes washers'],
  dishwasher: ['dishwasher', 'dishwashers'],
  'drinking-fountain': ['drinking fountain', 'drinking fountains'],
  'garbage-grinder': ['garbage grinder', 'garbage grinders'],
  'wash-fountain': ['wash fountain', 'wash fountains'],
  'macerating-toilet': ['macerating toilet', 'macerating toilets'],
  'clinical-sink': ['clinical sink', 'clinical sinks'],
  'dental-unit': ['dental unit', 'dental units'],
  'other-fixture': ['other fixture', 'other fixtures'],
};
