#include "cli/files.hpp"

#include <fcntl.h>
#include <sys/stat.h>
#include <unistd.h>

#include <bandwright/fault.hpp>
#include <cerrno>
#include <cstdlib>
#include <cstring>
#include <filesystem>
#include <string_view>

namespace bandwright::cli {

namespace {

namespace fs = std::filesystem;

constexpr std::size_t kLargestInput = 64u << 20;  // bytes: a thousand times the largest result
constexpr mode_t kNewFile = 0666;                 // before the umask

[[noreturn]] void fail(const std::string& what, const std::string& path, int error) {
  throw FileError(what + " '" + path + "': " + std::strerror(error));
}

// A file descriptor that is closed at the end of its scope.
class Descriptor {
public:
  explicit Descriptor(int number) : number_(number) {}
  ~Descriptor() {
    if (number_ >= 0) ::close(number_);
  }
  Descriptor(const Descriptor&) = delete;
  Descriptor& operator=(const Descriptor&) = delete;
  int number() const { return number_; }
  /// Closes now; the error number, or 0.
  int close() {
    const int outcome = ::close(number_);
    number_ = -1;
    return outcome == 0 ? 0 : errno;
  }

private:
  int number_;
};

// Writes all of it; the error number, or 0.
int write_all(int descriptor, std::string_view text) {
  while (!text.empty()) {
    const ssize_t written = ::write(descriptor, text.data(), text.size());
    if (written < 0 && errno == EINTR) continue;
    if (written < 0) return errno;
    text.remove_prefix(static_cast<std::size_t>(written));
  }
  return 0;
}

std::string read_all(int descriptor, const std::string& name) {
  std::string text;
  char buffer[1 << 16];
  while (true) {
    const ssize_t got = ::read(descriptor, buffer, sizeof buffer);
    if (got < 0 && errno == EINTR) continue;
    if (got < 0) fail("cannot read", name, errno);
    if (got == 0) return text;
    text.append(buffer, static_cast<std::size_t>(got));
    if (text.size() > kLargestInput) throw FileError("cannot read '" + name + "': longer than 64 MiB");
  }
}

std::string folder_of(const std::string& path) {
  const fs::path folder = fs::path(path).parent_path();
  return folder.empty() ? "." : folder.string();
}

// A dangling link leads to a file that is to be made where it points.
std::string links_followed(const std::string& path) {
  std::error_code error;
  if (!fs::is_symlink(path, error)) return path;
  const fs::path target = fs::weakly_canonical(path, error);
  return error ? path : target.string();
}

mode_t current_umask() {
  const mode_t mask = ::umask(0);
  ::umask(mask);
  return mask;
}

// Removes an unfinished file unless it was put in place.
class Unfinished {
public:
  explicit Unfinished(std::string path) : path_(std::move(path)) {}
  ~Unfinished() {
    if (!path_.empty()) ::unlink(path_.c_str());
  }
  Unfinished(const Unfinished&) = delete;
  Unfinished& operator=(const Unfinished&) = delete;
  void keep() { path_.clear(); }

private:
  std::string path_;
};

void write_directly(const std::string& path, const std::string& text) {
  Descriptor file(::open(path.c_str(), O_WRONLY | O_CLOEXEC));
  if (file.number() < 0) fail("cannot write", path, errno);
  const int error = write_all(file.number(), text);
  if (error != 0 && error != EPIPE) fail("cannot write", path, error);
}

// The new file stands beside the old one until it is complete, so that a full disk or a crash leaves the old one whole.
void replace(const std::string& path, const std::string& text) {
  struct stat old = {};
  const bool exists = ::stat(path.c_str(), &old) == 0;
  std::string draft = path + ".XXXXXX";
  Descriptor file(::mkostemp(draft.data(), O_CLOEXEC));
  if (file.number() < 0) fail("cannot write", path, errno);
  Unfinished unfinished(draft);
  if (exists && ::fchown(file.number(), old.st_uid, old.st_gid) != 0) {
    // Another owner's file becomes ours, as with any program that replaces files.
  }
  if (::fchmod(file.number(), exists ? old.st_mode & 07777 : kNewFile & ~current_umask()) != 0)
    fail("cannot write", path, errno);
  if (const int error = write_all(file.number(), text); error != 0) fail("cannot write", path, error);
  if (::fsync(file.number()) != 0 && errno != EINVAL && errno != EROFS) fail("cannot write", path, errno);
  if (const int error = file.close(); error != 0) fail("cannot write", path, error);
  if (::rename(draft.c_str(), path.c_str()) != 0) fail("cannot write", path, errno);
  unfinished.keep();
}

}  // namespace

NamedText read_text(const std::string& path) {
  if (path == "-") return {"standard input", read_all(STDIN_FILENO, "standard input")};
  const Descriptor file(::open(path.c_str(), O_RDONLY | O_CLOEXEC));
  if (file.number() < 0) fail("cannot read", path, errno);
  return {path, read_all(file.number(), path)};
}

Destination::Destination(const std::optional<std::string>& path) {
  if (!path || *path == "-") return;
  if (path->empty()) throw FileError("cannot write '': the name is empty");
  path_ = links_followed(*path);
  struct stat target = {};
  if (::stat(path_.c_str(), &target) == 0) {
    if (S_ISDIR(target.st_mode)) fail("cannot write", *path, EISDIR);
    if (::access(path_.c_str(), W_OK) != 0) fail("cannot write", *path, errno);
    if (!S_ISREG(target.st_mode)) return;
  } else if (errno != ENOENT || path_.back() == '/') {
    fail("cannot write", *path, errno == ENOENT ? EISDIR : errno);
  }
  const std::string folder = folder_of(path_);
  if (::access(folder.c_str(), W_OK | X_OK) != 0) fail("cannot write '" + *path + "': the folder", folder, errno);
}

void Destination::write(const std::string& text) const {
  if (is_standard_output()) {
    const int error = write_all(STDOUT_FILENO, text);
    if (error != 0 && error != EPIPE) fail("cannot write", "standard output", error);
    return;
  }
  struct stat target = {};
  const bool other = ::stat(path_.c_str(), &target) == 0 && !S_ISREG(target.st_mode);
  if (other)
    write_directly(path_, text);
  else
    replace(path_, text);
}

bool same_file(const std::string& a, const std::string& b) {
  std::error_code error;
  return fs::equivalent(a, b, error) && !error;
}

}  // namespace bandwright::cli
