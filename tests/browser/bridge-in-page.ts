/** Puts the spreadsheet program's end of the native bridge into the page, before the maker's runtime loads. */
import { HostBridge, type Channel, type EmptyCell, type HostCell, type Metadata } from "../host/bridge";

declare global {
  interface Window {
    _richApiNativeBridge: Channel;
    startBridge(metadata: Metadata, empty: EmptyCell): void;
    callFunction(id: string, args: readonly unknown[]): Promise<HostCell[][]>;
    callMany(calls: readonly (readonly [id: string, args: readonly unknown[]])[]): Promise<HostCell[][][]>;
  }
}

// The runtime keeps the channel that it finds while it loads; which metadata go with it is said later.
let bridge = new HostBridge({ functions: [] }, 0);
const channel: Channel = { sendMessageToHost: (text) => bridge.channel.sendMessageToHost(text) };
window._richApiNativeBridge = channel;
window.startBridge = (metadata, empty) => {
  bridge = new HostBridge(metadata, empty);
  bridge.channel.onMessageFromHost = (text) => channel.onMessageFromHost?.(text);
};
window.callFunction = (id, args) => bridge.call(id, args);
window.callMany = (calls) => Promise.all(calls.map(([id, args]) => bridge.call(id, args)));
