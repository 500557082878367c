import { useEffect, useRef, type ReactNode } from 'react';
import { Outlet, ScrollRestoration, useLocation, useNavigation } from 'react-router-dom';
import { SiteFooter } from './site-footer.tsx';
import { SiteHeader } from './site-header.tsx';

/** After a navigation the keyboard starts at the new page, not at the old link. */
function useFocusAfterNavigation() {
  const main = useRef<HTMLElement>(null);
  const { pathname, hash } = useLocation();
  const shown = useRef(pathname);
  useEffect(() => {
    if (shown.current === pathname) return;
    shown.current = pathname;
    if (hash === '') main.current?.focus({ preventScroll: true });
  }, [pathname, hash]);
  return main;
}

type FrameProps = {
  children: ReactNode;
  mainRef?: React.Ref<HTMLElement>;
};

/** Header, page, footer. */
export function Frame({ children, mainRef }: FrameProps) {
  return (
    <div className="flex min-h-dvh flex-col">
      <a
        href="#main"
        className="sr-only rounded bg-case text-on-case focus:not-sr-only focus:absolute focus:top-2 focus:left-2 focus:z-50 focus:px-4 focus:py-2"
      >
        Skip to the page
      </a>
      <SiteHeader />
      <main ref={mainRef} id="main" tabIndex={-1} className="flex grow flex-col">
        {children}
      </main>
      <SiteFooter />
    </div>
  );
}

/** The frame around every page. */
export function Shell() {
  const main = useFocusAfterNavigation();
  const navigation = useNavigation();
  return (
    <Frame mainRef={main}>
      <div
        aria-hidden="true"
        className={`pointer-events-none fixed inset-x-0 top-0 z-50 h-0.5 overflow-hidden ${navigation.state === 'idle' ? 'hidden' : ''}`}
      >
        <div className="h-full w-1/3 bg-case [animation:progress-drift_1.2s_ease-in-out_infinite]" />
      </div>
      <Outlet />
      <ScrollRestoration />
    </Frame>
  );
}

/** The usual measure of a page inside the frame. */
export function Page({ children, narrow = false }: { children: ReactNode; narrow?: boolean }) {
  return (
    <div
      className={`mx-auto w-full px-4 py-9 sm:px-7 sm:py-12 ${narrow ? 'max-w-[34rem]' : 'max-w-page'}`}
    >
      {children}
    </div>
  );
}
