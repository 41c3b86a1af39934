'use client';
import { createContext, useContext } from 'react';
import type { FigureOrigin } from './figure-words';

/** Absent where figures are drawn that no claim owns: those are not saved. */
export const FigureOriginContext = createContext<FigureOrigin | null>(null);
export const useFigureOrigin = (): FigureOrigin | null => useContext(FigureOriginContext);
