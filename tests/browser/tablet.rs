//! A person's tablet: Chromium behind its driver, with the few things a person does and sees on it.

use super::program::SignIn;
use std::io::{BufRead, BufReader, Read, Write};
use std::net::TcpStream;
use std::path::{Path, PathBuf};
use std::process::{Child, Command, Stdio};
use std::time::{Duration, Instant};
use tempfile::TempDir;
use thirtyfour::common::log::BrowserLogEntry;
use thirtyfour::prelude::*;
use thirtyfour::{ChromiumLikeCapabilities, LoggingPrefsLogLevel};

/// Quiet, without a window, without calling anywhere.
const ARGUMENTS: [&str; 9] = [
    "--headless=new",
    "--no-sandbox",
    "--disable-gpu",
    "--disable-dev-shm-usage",
    "--no-first-run",
    "--disable-background-networking",
    "--disable-component-update",
    "--disable-sync",
    "--hide-scrollbars",
];

/// The driver's process; told to close its browsers when dropped.
struct Driver {
    child: Child,
    port: u16,
}

impl Driver {
    fn start() -> Self {
        let started = Command::new("chromedriver").arg("--port=0").stdout(Stdio::piped()).spawn();
        let mut child = started.expect("chromedriver is installed: apt-get install chromium chromium-driver");
        let printed = BufReader::new(child.stdout.take().expect("its output"));
        let port = printed
            .lines()
            .map_while(Result::ok)
            .find_map(|line| line.split_once("successfully on port ")?.1.trim_end_matches('.').parse().ok());
        Self { child, port: port.expect("chromedriver names its port") }
    }
}

impl Drop for Driver {
    fn drop(&mut self) {
        // Asked first, because a killed driver leaves its browsers running.
        if let Ok(mut wire) = TcpStream::connect(("127.0.0.1", self.port)) {
            let _ = wire.set_read_timeout(Some(Duration::from_secs(5)));
            let _ =
                write!(wire, "GET /shutdown HTTP/1.1\r\nHost: 127.0.0.1:{}\r\nConnection: close\r\n\r\n", self.port);
            let _ = wire.read(&mut [0; 256]);
        }
        let asked = Instant::now();
        while asked.elapsed() < Duration::from_secs(5) && !matches!(self.child.try_wait(), Ok(Some(_))) {
            std::thread::sleep(Duration::from_millis(50));
        }
        let _ = self.child.kill();
        let _ = self.child.wait();
    }
}

/// A tablet in somebody's hands.
pub struct Tablet {
    pub web: WebDriver,
    /// Address of the program it looks at.
    pub home: String,
    /// Where its downloads go.
    pub downloads: TempDir,
    shots: PathBuf,
    _profile: TempDir,
    _driver: Driver,
}

impl Tablet {
    /// A new one with nothing in it; pictures go into a folder of this name under the target folder.
    pub async fn new(home: &str, size: (u32, u32), shots: &str) -> Self {
        let driver = Driver::start();
        let profile = tempfile::tempdir().expect("a folder");
        let downloads = tempfile::tempdir().expect("a folder");
        let mut wanted = DesiredCapabilities::chrome();
        for argument in ARGUMENTS {
            wanted.add_arg(argument).expect("an argument");
        }
        wanted.add_arg(&format!("--user-data-dir={}", profile.path().display())).expect("an argument");
        wanted.set_browser_log_level(LoggingPrefsLogLevel::All).expect("a level");
        let web = WebDriver::new(format!("http://127.0.0.1:{}", driver.port), wanted).await.expect("a browser");
        let shots = Path::new(env!("CARGO_TARGET_TMPDIR")).join("screenshots").join(shots);
        std::fs::create_dir_all(&shots).expect("a folder for pictures");
        let tablet = Self { web, home: home.to_owned(), downloads, shots, _profile: profile, _driver: driver };
        tablet
            .devtools(
                "Browser.setDownloadBehavior",
                serde_json::json!({ "behavior": "allow", "downloadPath": tablet.downloads.path() }),
            )
            .await;
        tablet.turn(size).await;
        tablet
    }

    /// Says something to the browser that has no place in the driver's own language.
    pub async fn devtools(&self, method: &str, with: serde_json::Value) {
        self.web.cdp().send_raw(method, with).await.unwrap_or_else(|e| panic!("{method}: {e}"));
    }

    /// Sets the size of the screen.
    pub async fn turn(&self, (width, height): (u32, u32)) {
        let size = serde_json::json!({ "width": width, "height": height, "deviceScaleFactor": 1, "mobile": false });
        self.devtools("Emulation.setDeviceMetricsOverride", size).await;
    }

    /// What the system prefers: daylight or dark.
    pub async fn prefer(&self, scheme: &str) {
        // Without motion, so that nothing is measured half way from one colour to the other.
        let media = serde_json::json!({ "features": [
            { "name": "prefers-color-scheme", "value": scheme },
            { "name": "prefers-reduced-motion", "value": "reduce" },
        ] });
        self.devtools("Emulation.setEmulatedMedia", media).await;
    }

    /// Opens an address of the program.
    pub async fn open(&self, path: &str) {
        self.web.goto(format!("{}{path}", self.home)).await.unwrap_or_else(|e| panic!("{path}: {e}"));
    }

    /// Path and query of the page on screen.
    pub async fn path(&self) -> String {
        let address = self.web.current_url().await.expect("an address").to_string();
        address.strip_prefix(&self.home).unwrap_or(&address).to_owned()
    }

    /// The only visible element of this kind.
    pub async fn one(&self, css: &str) -> WebElement {
        match self.web.find(By::Css(css)).await {
            Ok(found) => found,
            Err(e) => panic!("no {css} at {}: {e}\n{}", self.path().await, self.text("body").await),
        }
    }

    /// Text of an element; empty without one.
    pub async fn text(&self, css: &str) -> String {
        match self.web.find(By::Css(css)).await {
            Ok(found) => found.text().await.unwrap_or_default(),
            Err(_) => String::new(),
        }
    }

    /// Taps an element, brought into the middle of the screen as a person would.
    pub async fn tap(&self, element: &WebElement) {
        let to_middle = "arguments[0].scrollIntoView({ block: 'center', behavior: 'instant' })";
        self.web.execute(to_middle, vec![element.to_json().expect("an element")]).await.expect("scrolls");
        if let Err(e) = element.click().await {
            let shown = element.outer_html().await.unwrap_or_default();
            panic!("cannot tap {shown} at {}: {e}", self.path().await);
        }
    }

    /// Taps what leads to another page, and waits until that is there.
    pub async fn go(&self, element: &WebElement) {
        self.web.execute("document.documentElement.dataset.left = ''", vec![]).await.expect("marks the page");
        self.tap(element).await;
        let arrived =
            "return document.documentElement.dataset.left === undefined && document.readyState === 'complete'";
        let tapped = Instant::now();
        while tapped.elapsed() < Duration::from_secs(60) {
            // While one page gives way to the next there is nothing to ask.
            let there = self.web.execute(arrived, vec![]).await.and_then(|answer| answer.convert::<bool>());
            if there.unwrap_or(false) {
                return;
            }
            tokio::time::sleep(Duration::from_millis(10)).await;
        }
        panic!("nothing came after {}", self.path().await);
    }

    /// A link or button by its words.
    pub async fn words(&self, words: &str) -> WebElement {
        let path = ["main", "footer"]
            .map(|part| format!("//{part}//*[self::a or self::button][normalize-space(.)='{words}']"))
            .join(" | ");
        match self.web.find(By::XPath(&path)).await {
            Ok(found) => found,
            Err(_) => panic!("nothing says “{words}” at {}:\n{}", self.path().await, self.text("body").await),
        }
    }

    /// Goes where a link or button of these words leads.
    pub async fn go_by(&self, words: &str) {
        let element = self.words(words).await;
        self.go(&element).await;
    }

    /// Signs in and is wherever that leads.
    pub async fn sign_in(&self, who: &SignIn) {
        self.open("/sign-in").await;
        self.one("input[name=login]").await.send_keys(&who.login).await.expect("types");
        self.one("input[name=password]").await.send_keys(&who.password).await.expect("types");
        self.go_by("Sign in").await;
        assert_eq!(self.path().await, "/", "{}", self.text("main").await);
    }

    /// Signs out through the menu.
    pub async fn sign_out(&self) {
        self.one("details.menu > summary").await.click().await.expect("opens the menu");
        let out = self.one("details.menu form[action='/sign-out'] button").await;
        self.go(&out).await;
        assert!(self.path().await.starts_with("/sign-in"), "{}", self.path().await);
    }

    /// What the browser complained about since last asked: errors of scripts and files, refusals of its content policy.
    pub async fn complaints(&self) -> Vec<String> {
        let log: Vec<BrowserLogEntry> = self.web.browser_log().await.expect("the browser's log");
        log.into_iter()
            .filter(|e| e.level != "INFO" && e.level != "DEBUG")
            .map(|e| format!("{}: {}", e.level, e.message))
            .collect()
    }

    /// Holds that the browser had nothing to complain about.
    pub async fn is_content(&self) {
        let complaints = self.complaints().await;
        assert!(complaints.is_empty(), "at {}: {complaints:#?}", self.path().await);
    }

    /// Keeps a picture of the screen.
    pub async fn picture(&self, name: &str) -> PathBuf {
        let file = self.shots.join(format!("{name}.png"));
        self.web.screenshot(&file).await.expect("a picture");
        file
    }

    /// Keeps a picture of the whole page, as on a screen that is high enough for it.
    pub async fn whole_picture(&self, name: &str, (width, height): (u32, u32)) -> PathBuf {
        let tall = self.web.execute("return document.documentElement.scrollHeight", vec![]).await.expect("a height");
        let tall: u32 = tall.convert().expect("a number");
        self.turn((width, tall.clamp(height, 6000))).await;
        let file = self.picture(name).await;
        self.turn((width, height)).await;
        file
    }
}

impl Drop for Tablet {
    fn drop(&mut self) {
        // The driver closes its browsers itself; asked here, the browser would be waited for in vain.
        let _ = self.web.clone().leak();
    }
}
