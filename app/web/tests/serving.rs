//! The accept loop over a real port: a half-sent request is closed, the next is answered, a stop is graceful.

use super::world::World;
use std::time::{Duration, Instant};
use tokio::io::{AsyncReadExt, AsyncWriteExt};
use tokio::net::{TcpListener, TcpStream};
use tokio::sync::oneshot;

async fn ask(address: std::net::SocketAddr, path: &str) -> String {
    let mut stream = TcpStream::connect(address).await.expect("connects");
    stream
        .write_all(format!("GET {path} HTTP/1.1\r\nhost: {address}\r\nconnection: close\r\n\r\n").as_bytes())
        .await
        .expect("sends");
    let mut answer = Vec::new();
    stream.read_to_end(&mut answer).await.expect("answers");
    String::from_utf8_lossy(&answer).into_owned()
}

#[tokio::test(flavor = "multi_thread", worker_threads = 2)]
async fn half_a_request_is_closed_in_time_while_others_are_answered() {
    let world = World::new().await;
    let listener = TcpListener::bind("127.0.0.1:0").await.expect("binds");
    let address = listener.local_addr().expect("bound");
    let (stop, stopped) = oneshot::channel::<()>();
    let serving = tokio::spawn(crate::serve(listener, world.app.clone(), async { drop(stopped.await) }));

    let began = Instant::now();
    let mut half = TcpStream::connect(address).await.expect("connects");
    half.write_all(b"GET /about HTTP/1.1\r\nhost: x\r\nx-slow: ").await.expect("sends");
    let mut silent = TcpStream::connect(address).await.expect("connects");
    assert!(ask(address, "/about").await.starts_with("HTTP/1.1 200"), "others are answered meanwhile");

    let mut rest = Vec::new();
    let limit = crate::serve::HEAD_WITHIN + Duration::from_secs(3);
    let closed = tokio::time::timeout(limit, half.read_to_end(&mut rest)).await;
    assert!(closed.is_ok(), "the half-sent request was still open after {:?}", began.elapsed());
    assert!(!String::from_utf8_lossy(&rest).contains("200 OK"));
    let closed = tokio::time::timeout(Duration::from_secs(3), silent.read_to_end(&mut rest)).await;
    assert!(closed.is_ok(), "the silent connection was still open after {:?}", began.elapsed());

    stop.send(()).expect("serving");
    tokio::time::timeout(Duration::from_secs(12), serving).await.expect("stops").expect("no panic").expect("no fault");
}
