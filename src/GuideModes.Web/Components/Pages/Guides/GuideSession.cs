using System.Collections.Immutable;
using GuideModes.Guides;
using GuideModes.Solvers.Certification;
using GuideModes.Web.Solving;

namespace GuideModes.Web.Components.Pages.Guides;

/// <summary>An answer, and the document it answers.</summary>
public sealed record SolvedGuide(GuideDocument Document, GuideAnswer Answer);

/// <summary>
/// One person's guide at the bench: the document, how it came to be, its faults and its latest answer.
/// </summary>
/// <remarks>
/// An edit makes a new document; the engines run off the caller's thread, and a run that a later edit overtook is
/// cancelled. <see cref="Latest"/> stays what it was until a new answer is there, and says which document it belongs to.
/// <see cref="Changed"/> may come on any thread; everything else is called from one.
/// </remarks>
public sealed class GuideSession(SolveService solver, ILogger<GuideSession> log) : IDisposable
{
    private const int LongestHistory = 500;

    /// <summary>An answer that comes within this is shown at once; only a longer wait is announced.</summary>
    private static readonly TimeSpan Grace = TimeSpan.FromMilliseconds(60);

    private readonly List<GuideDocument> _past = [];
    private readonly Stack<GuideDocument> _future = [];
    private CancellationTokenSource? _run;

    public event Action? Changed;

    public GuideDocument Document { get; private set; } = NewGuide.Document;

    public ImmutableArray<Fault> Faults { get; private set; } = [];

    public SolvedGuide? Latest { get; private set; }

    /// <summary>Why the engines gave no answer, in a sentence; null where they did or are at work.</summary>
    public string? Trouble { get; private set; }

    public bool IsBusy { get; private set; }

    /// <summary>True when what is shown answers an earlier document.</summary>
    public bool IsStale => Latest is not null && !Latest.Document.Equals(Document);

    public bool CanUndo => _past.Count > 0;

    public bool CanRedo => _future.Count > 0;

    /// <summary>Starts afresh with a document.</summary>
    public void Open(GuideDocument document)
    {
        _past.Clear();
        _future.Clear();
        Latest = null;
        Show(document);
    }

    /// <summary>Makes a new document of the present one; one that changes nothing leaves no trace.</summary>
    public void Edit(Func<GuideDocument, GuideDocument> edit)
    {
        GuideDocument edited;
        try
        {
            edited = edit(Document);
        }
        catch (Exception e) when (e is InvalidOperationException or ArgumentException)
        {
            // A document that came from elsewhere may hold, say, a number where a region should be.
            Trouble = "This part of the document is not built as a guide document is; remove it, or put it right in the file.";
            Changed?.Invoke();
            return;
        }

        if (edited.Equals(Document)) return;
        if (_past.Count == LongestHistory) _past.RemoveAt(0);
        _past.Add(Document);
        _future.Clear();
        Show(edited);
    }

    public void Undo()
    {
        if (!CanUndo) return;
        _future.Push(Document);
        var previous = _past[^1];
        _past.RemoveAt(_past.Count - 1);
        Show(previous);
    }

    public void Redo()
    {
        if (!CanRedo) return;
        _past.Add(Document);
        Show(_future.Pop());
    }

    public void Dispose() => _run?.Cancel();

    private void Show(GuideDocument document)
    {
        Document = document;
        _run?.Cancel();
        _run = null;
        Trouble = null;
        var reading = GuideReader.Read(document);
        Faults = reading.Faults;
        IsBusy = reading.Guide is not null;
        if (reading.Guide is { } guide) _ = SolveAsync(document, guide, _run = new CancellationTokenSource());
        else Changed?.Invoke();
    }

    private async Task SolveAsync(GuideDocument document, Guide guide, CancellationTokenSource run)
    {
        SolvedGuide? solved = null;
        string? trouble = null;
        try
        {
            var solving = solver.SolveAsync(guide, run.Token);
            if (await Task.WhenAny(solving, Task.Delay(Grace, run.Token)) != solving && !run.IsCancellationRequested) Changed?.Invoke();
            solved = new(document, await solving);
        }
        catch (OperationCanceledException)
        {
            return;
        }
        catch (WorkBudgetException e)
        {
            trouble = e.Message;
        }
        catch (Exception e)
        {
            SessionLog.SolveFailed(log, e, document.ToString());
            trouble = "The engines broke off on this guide. The document is unharmed; the log holds what happened.";
        }

        if (run.IsCancellationRequested) return;
        Latest = solved ?? Latest;
        Trouble = trouble;
        IsBusy = false;
        Changed?.Invoke();
    }
}

internal static partial class SessionLog
{
    [LoggerMessage(LogLevel.Error, "The engines broke off on {Document}")]
    public static partial void SolveFailed(ILogger logger, Exception exception, string document);
}
