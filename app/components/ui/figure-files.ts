import { createContext } from 'react';

/** Address under which the numbers of a page's figures lie as files; null where none may be taken away. */
export const FigureFilesContext = createContext<string | null>(null);
