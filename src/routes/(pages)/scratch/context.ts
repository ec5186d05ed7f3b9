import { createContext } from 'svelte';
import type { Worksheet } from './worksheet.svelte';

export const [useWorksheet, provideWorksheet] = createContext<Worksheet>();
