#!/usr/bin/env Rscript
# Makes a site in Foothold from two GeoTIFFs, simulates it, and fetches results. Needs R 4 with jsonlite, and curl.
#
#     export FOOTHOLD_TOKEN=fh_...     # made on the account page
#     Rscript run_site.R site http://localhost:4173 habitat.tif cover.tif settings.json out --product /path/to/foothold
#     Rscript run_site.R fetch http://localhost:4173 RUN_ID out
#
# `site` needs a token that may read and write and reaches one team, `fetch` one that may read. See docs/api.md.

library(jsonlite)

refuse <- function(...) {
  message(...)
  quit(save = "no", status = 1)
}

usage <- "Rscript run_site.R site URL HABITAT COVER SETTINGS OUT [--product FOLDER]\nRscript run_site.R fetch URL RUN_ID OUT"
given <- commandArgs(trailingOnly = TRUE)
token <- Sys.getenv("FOOTHOLD_TOKEN")
if (token == "") refuse("Set FOOTHOLD_TOKEN to an access token of your account page.")
if (length(given) < 4) refuse(usage)
url <- sub("/+$", "", given[2])

# One request by curl, whose settings go in by a pipe, so that no list of processes shows the token.
# `form` holds the parts of a form; `to` is where the reply is saved.
ask <- function(method, path, body = NULL, form = NULL, to = tempfile()) {
  quoted <- function(text) paste0('"', gsub('(["\\\\])', "\\\\\\1", text), '"')
  settings <- c(
    paste("url =", quoted(paste0(url, path))),
    paste("request =", quoted(method)),
    paste("header =", quoted(paste("Authorization: Bearer", token)))
  )
  if (!is.null(body)) {
    sent <- tempfile()
    on.exit(unlink(sent))
    writeLines(body, sent, sep = "", useBytes = TRUE)
    settings <- c(settings, 'header = "Content-Type: application/json"', paste("data-binary =", quoted(paste0("@", sent))))
  }
  for (part in form) settings <- c(settings, paste("form =", quoted(part)))
  partial <- paste0(to, ".partial")
  arguments <- c("--silent", "--show-error", "--write-out", shQuote("%{http_code}"), "--output", shQuote(partial), "--config", "-")
  status <- suppressWarnings(system2("curl", arguments, input = settings, stdout = TRUE))
  if (length(status) == 0 || status[1] == "000") refuse("There was no answer from ", url)
  if (as.integer(status[1]) >= 400) {
    problem <- tryCatch(fromJSON(partial), error = function(e) list(detail = "no reason was given"))
    unlink(partial)
    refuse(status[1], " ", problem$code, ": ", problem$detail)
  }
  if (file.exists(partial)) file.rename(partial, to)
  to
}

as_json <- function(value) toJSON(value, auto_unbox = TRUE, digits = NA, null = "null")
read_reply <- function(file) fromJSON(file, simplifyVector = FALSE)
get_json <- function(path) read_reply(ask("GET", path))
send_json <- function(method, path, value) read_reply(ask(method, path, body = as_json(value)))
save_file <- function(path, file) {
  ask("GET", path, to = file)
  cat("saved", file, "\n")
}

# Asks until an upload has come to the wanted state; the server reads and aligns rasters in the background.
wait_for <- function(uploads, upload, wanted) {
  repeat {
    if (upload$state == wanted) return(upload)
    if (upload$state %in% c("refused", "failed", "cancelled")) refuse(upload$fileName, ": ", upload$problem$detail)
    if (upload$state == "choices") refuse(upload$fileName, ": somebody must decide about it on the site's Ground page.")
    Sys.sleep(0.5)
    upload <- get_json(paste0(uploads, "/", upload$id))
  }
}

send_raster <- function(uploads, file, fields) {
  parts <- c(paste0(names(fields), "=", unlist(fields)), paste0("file=@", file, ";type=image/tiff"))
  read_reply(ask("POST", uploads, form = parts))
}

# Uploads both rasters, makes a site of them and sets class table, plant and outlook.
make_site <- function(habitat, cover, settings) {
  teams <- get_json("/api/teams")$teams
  if (length(teams) != 1) refuse("The token reaches ", length(teams), " teams; make one for a single team.")
  uploads <- paste0("/api/teams/", teams[[1]]$teamId, "/uploads")
  upload <- wait_for(uploads, send_raster(uploads, habitat, list(part = "habitat")), "choices")
  open <- intersect(unlist(upload$decisions), c("part", "band", "heights", "values"))
  if (length(open) > 0 || is.null(upload$plan)) refuse(habitat, ": ", upload$problem$detail, " ", toString(open))
  # Making the site agrees to the plan: read its cautions before you do so with a raster that you do not know.
  for (caution in upload$plan$cautions) cat("note:", caution$text, "\n")
  site <- send_json("POST", paste0(uploads, "/", upload$id, "/site"), list(name = "Made by a script"))
  cat("made the site", site$id, "\n")
  wait_for(uploads, get_json(paste0(uploads, "/", upload$id)), "done")
  fields <- list(siteId = site$id, part = "cover", place = "when-clear")
  wait_for(uploads, send_raster(uploads, cover, fields), "done")

  path <- paste0("/api/sites/", site$id)
  layers <- get_json(path)$layers
  habitat_id <- Filter(function(layer) layer$part == "habitat", layers)[[1]]$id
  send_json("PUT", paste0(path, "/layers/", habitat_id, "/classes"), list(classes = settings$classes))
  send_json("PUT", paste0(path, "/plant"), settings$plant)
  send_json("PUT", paste0(path, "/outlook"), settings$outlook)
}

# Fetches the rasters as they lie on the site's grid and writes a RunSpec (docs/run-spec.md) that names them.
write_spec <- function(site, settings, out) {
  raster <- list()
  for (layer in site$layers) {
    name <- paste0(layer$part, ".tif")
    save_file(paste0("/api/sites/", site$id, "/layer-files/", layer$hash), file.path(out, name))
    raster[[layer$part]] <- list(file = name, sha256 = layer$hash)
  }
  by_class <- function(what) {
    values <- lapply(settings$classes, function(row) row[[what]])
    names(values) <- sapply(settings$classes, function(row) row$value)
    c(raster$habitat, list(classes = values))
  }
  span <- site$outlook[c("surveyYear", "years", "stepsPerYear", "boundary", "droughtIndex")]
  layers <- list(capacity = by_class("capacity"), vigour = by_class("vigour"), cover = raster$cover)
  spec <- c(list(version = 1, seed = settings$seed), span, list(rates = site$plant$rates, layers = layers))
  file <- file.path(out, "spec.json")
  writeLines(as_json(spec), file)
  file
}

# Runs the engine on this machine, as pages do in browsers; the server runs nothing. It checks the rasters' SHA-256.
simulate <- function(product, spec, result) {
  paths <- shQuote(normalizePath(c(spec, result), mustWork = FALSE))
  here <- setwd(product)
  on.exit(setwd(here))
  status <- system2("npm", c("run", "-s", "simulate", "--", paths[1], "--out", paths[2]))
  if (status != 0) refuse("The simulation ended with code ", status)
  summary <- fromJSON(file.path(gsub("^'|'$", "", paths[2]), "summary.json"))
  cat("simulated; digest", summary$digest, "\n")
}

# Everything of a run that is stored: spec and rasters as ZIP, series as CSV, closing years and last cover as GeoTIFF.
fetch <- function(run_id, out) {
  path <- paste0("/api/runs/", run_id)
  run <- get_json(path)
  save_file(paste0(path, "/files.zip"), file.path(out, "files.zip"))
  if (run$status != "finished") refuse("The run is ", run$status, "; its series and maps are there once a browser has finished it.")
  save_file(paste0(path, "/series.csv"), file.path(out, "series.csv"))
  save_file(paste0(path, "/closing.tif"), file.path(out, "closing.tif"))
  last <- max(unlist(run$storedYears))
  save_file(paste0(path, "/cover/", last), file.path(out, paste0("cover-", last, ".tif")))
}

if (given[1] == "fetch") {
  dir.create(given[4], showWarnings = FALSE, recursive = TRUE)
  fetch(given[3], given[4])
} else if (given[1] == "site" && length(given) >= 6) {
  out <- normalizePath(given[6], mustWork = FALSE)
  dir.create(out, showWarnings = FALSE, recursive = TRUE)
  settings <- fromJSON(given[5], simplifyVector = FALSE)
  site <- make_site(given[3], given[4], settings)
  spec <- write_spec(site, settings, out)
  if (length(given) == 8 && given[7] == "--product") simulate(given[8], spec, file.path(out, "result"))
} else {
  refuse(usage)
}
