/** The providers that every picture island stands in. */
import { QueryClientProvider } from '@tanstack/react-query';
import { useEffect, useRef, useState, type ReactNode } from 'react';
import { createClient } from '../../client';
import { homeCentre } from '../../scene/defaults';
import { turnTo } from '../../store/actions';
import { BenchProvider } from '../bench';
import { SvgPatterns } from '../log/SvgPatterns';
import { usePicture, type PictureProps } from './payload';

/** Fetches outlines once for all islands of a page. */
const shared = typeof window === 'undefined' ? null : createClient();

export function PictureFrame({ children, ...props }: PictureProps & { readonly children: ReactNode }) {
  const [client] = useState(() => shared ?? createClient());
  return (
    <QueryClientProvider client={client}>
      <Inner {...props}>{children}</Inner>
    </QueryClientProvider>
  );
}

function Inner({ children, ...props }: PictureProps & { readonly children: ReactNode }) {
  const { scene, store, ready } = usePicture(props);
  const centred = useRef(props.shown?.centre !== undefined);
  useEffect(() => {
    if (!ready || centred.current) return;
    centred.current = true;
    turnTo(store, homeCentre(scene, store.getState()));
  }, [ready, scene, store]);
  return (
    <BenchProvider store={store} scene={scene}>
      <SvgPatterns />
      {children}
    </BenchProvider>
  );
}
