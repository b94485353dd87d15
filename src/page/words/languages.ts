import type { Language } from '../state.ts';
import { english } from './english.ts';
import { french } from './french.ts';
import type { Words } from './words.ts';

export const wordsIn = (language: Language): Words => (language === 'fr' ? french : english);
