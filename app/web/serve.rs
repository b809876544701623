//! The accept loop: header and idle time limits, a bound on connections, a graceful stop.

use crate::App;
use crate::routes::router;
use axum::extract::connect_info::ConnectInfo;
use hyper::server::conn::http1;
use hyper_util::rt::{TokioIo, TokioTimer};
use hyper_util::server::graceful::GracefulShutdown;
use hyper_util::service::TowerToHyperService;
use std::future::Future;
use std::io;
use std::sync::Arc;
use std::time::Duration;
use tokio::net::TcpListener;
use tokio::sync::Semaphore;

/// A request whose head is not complete by then is closed; so is a connection that stays silent.
pub const HEAD_WITHIN: Duration = Duration::from_secs(15);
/// A body of which nothing arrives for so long is given up.
pub const BODY_STALLED_AFTER: Duration = Duration::from_secs(45);
/// How long a stop waits for answers under way.
const STOP_WITHIN: Duration = Duration::from_secs(10);
/// Connections held at once; further ones wait to be accepted.
const CONNECTIONS: usize = 1024;

/// Serves pages until `shutdown` is ready, then finishes the answers under way.
///
/// # Errors
/// When the listener cannot accept any more.
pub async fn serve(listener: TcpListener, app: App, shutdown: impl Future<Output = ()> + Send) -> io::Result<()> {
    let pages = router(app);
    let places = Arc::new(Semaphore::new(CONNECTIONS));
    let graceful = GracefulShutdown::new();
    let mut shutdown = std::pin::pin!(shutdown);
    loop {
        let Ok(place) = Arc::clone(&places).acquire_owned().await else { break };
        let (stream, peer) = tokio::select! {
            accepted = listener.accept() => match accepted {
                Ok(accepted) => accepted,
                Err(fault) => {
                    // Out of file descriptors and the like pass; hammering on accept would make it worse.
                    tracing::warn!(%fault, "a connection could not be accepted");
                    tokio::time::sleep(Duration::from_millis(200)).await;
                    continue;
                }
            },
            () = &mut shutdown => break,
        };
        let service = pages.clone().layer(axum::Extension(ConnectInfo(peer)));
        let connection = http1::Builder::new()
            .timer(TokioTimer::new())
            .header_read_timeout(HEAD_WITHIN)
            .max_buf_size(64 * 1024)
            .serve_connection(TokioIo::new(stream), TowerToHyperService::new(service));
        let connection = graceful.watch(connection);
        tokio::spawn(async move {
            if let Err(fault) = connection.await {
                tracing::debug!(%fault, "a connection ended early");
            }
            drop(place);
        });
    }
    drop(listener);
    let _ = tokio::time::timeout(STOP_WITHIN, graceful.shutdown()).await;
    Ok(())
}
