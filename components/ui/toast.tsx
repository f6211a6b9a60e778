"use client";

import {
  createContext,
  useCallback,
  useContext,
  useMemo,
  useRef,
  useState,
  type ReactNode,
} from "react";
import { IconButton } from "./button";
import { Notice, type NoticeTone } from "./status";

interface Toast {
  id: number;
  tone: NoticeTone;
  title: string;
  detail?: ReactNode;
}

type ShowToast = (toast: { tone?: NoticeTone; title: string; detail?: ReactNode }) => void;

const ToastContext = createContext<ShowToast | null>(null);

/** What is said stays long enough to be read; errors stay until they are closed. */
const SHOWN_MS = 8_000;

/** A status region at the foot of the screen; screen readers hear what is added to it. */
export function ToastProvider({ children }: { children: ReactNode }) {
  const [toasts, setToasts] = useState<Toast[]>([]);
  const nextId = useRef(0);

  const close = useCallback(
    (id: number) => setToasts((shown) => shown.filter((toast) => toast.id !== id)),
    [],
  );
  const show = useCallback<ShowToast>(
    ({ tone = "success", ...toast }) => {
      const id = nextId.current++;
      setToasts((shown) => [...shown.slice(-3), { id, tone, ...toast }]);
      if (tone !== "error") setTimeout(() => close(id), SHOWN_MS);
    },
    [close],
  );

  return (
    <ToastContext.Provider value={show}>
      {children}
      <div className="toast-region no-print" role="status" aria-live="polite">
        {toasts.map(({ id, tone, title, detail }) => (
          <Notice
            key={id}
            tone={tone}
            title={title}
            live={false}
            actions={<IconButton icon="close" label="Close message" onClick={() => close(id)} />}
          >
            {detail}
          </Notice>
        ))}
      </div>
    </ToastContext.Provider>
  );
}

/** `const toast = useToast(); toast({ title: "Saved", detail: "Revision 5 is a draft." })` */
export function useToast(): ShowToast {
  const show = useContext(ToastContext);
  return useMemo(() => {
    if (!show) throw new Error("useToast needs a ToastProvider above it");
    return show;
  }, [show]);
}
