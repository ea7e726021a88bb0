namespace TensorRG.Reports.Tests;

public class DataTableTests
{
    [Theory]
    [MemberData(nameof(Cultures.Names), MemberType = typeof(Cultures))]
    public void Csv_is_the_committed_file_under_every_culture(string culture) =>
        Golden.Verify("table.csv", Cultures.Run(culture, () => Sample().ToCsv()));

    [Theory]
    [MemberData(nameof(Cultures.Names), MemberType = typeof(Cultures))]
    public void Json_is_the_committed_file_under_every_culture(string culture) =>
        Golden.Verify("table.json", Cultures.Run(culture, () => JsonText.Write(Sample().ToJson())));

    [Theory]
    [MemberData(nameof(Cultures.Names), MemberType = typeof(Cultures))]
    public void Screen_text_is_the_committed_file_under_every_culture(string culture) =>
        Golden.Verify("table.txt", Cultures.Run(culture, () => Screen(Sample())));

    [Fact]
    public void Csv_cells_are_quoted_after_RFC_4180()
    {
        var table = new DataTable(new TableColumn("a,b", ColumnKind.Text)).AddRow("say \"hi\"").AddRow("two\r\nlines").AddRow("").AddRow([null]);
        Assert.Equal("\"a,b\"\r\n\"say \"\"hi\"\"\"\r\n\"two\r\nlines\"\r\n\"\"\r\n\r\n", table.ToCsv());
    }

    [Fact]
    public void Headings_can_leave_the_unit_out()
    {
        var table = new DataTable(new TableColumn("seconds") { Unit = "s", Title = "time" });
        Assert.Equal("seconds [s]\r\n", table.ToCsv());
        Assert.Equal("seconds\r\n", table.ToCsv(withUnits: false));
        Assert.Equal("time [s]", table.Columns[0].Heading);
    }

    [Fact]
    public void Doubles_round_trip_through_csv_to_the_bit()
    {
        var random = new Random(7);
        for (var i = 0; i < 1000; i++)
        {
            var value = BitConverter.Int64BitsToDouble(random.NextInt64());
            if (!double.IsFinite(value)) continue;
            var text = new DataTable(new TableColumn("x")).AddRow(value).ToCsv().Split("\r\n")[1];
            Assert.Equal(value, double.Parse(text, System.Globalization.CultureInfo.InvariantCulture));
        }
    }

    [Fact]
    public void Wrong_cells_and_columns_are_refused()
    {
        var table = new DataTable(new TableColumn("chi", ColumnKind.WholeNumber), new TableColumn("x"));
        Assert.Throws<ArgumentException>(() => table.AddRow(8));
        Assert.Throws<ArgumentException>(() => table.AddRow(8.0, 1.0));
        Assert.Throws<ArgumentException>(() => table.AddRow(8, 1));
        Assert.Equal(0, table.RowCount);
        Assert.Throws<ArgumentException>(() => new DataTable());
        Assert.Throws<ArgumentException>(() => new DataTable(new TableColumn("x"), new TableColumn("x")));
        Assert.Throws<ArgumentException>(() => new DataTable(new TableColumn("x") { ErrorColumn = "y" }));
        Assert.Throws<ArgumentException>(() => new DataTable(new TableColumn("x") { ErrorColumn = "n" }, new TableColumn("n", ColumnKind.Text)));
    }

    [Fact]
    public void Cells_come_back_as_stored_and_there_are_no_others()
    {
        var table = Sample();
        Assert.Equal(8L, table[0, 0]);
        Assert.Null(table[2, 2]);
        Assert.Throws<ArgumentOutOfRangeException>(() => table[0, 99]);
        Assert.Throws<ArgumentOutOfRangeException>(() => table[99, 0]);
    }

    private static DataTable Sample() =>
        new DataTable(
            new TableColumn("bondDimension", ColumnKind.WholeNumber) { Title = "χ" },
            new TableColumn("logZPerSite") { Unit = "per site", ErrorColumn = "error", Title = "ln Z" },
            new TableColumn("error"),
            new TableColumn("deviation") { Style = NumberStyle.Scientific },
            new TableColumn("seconds") { Unit = "s", Style = NumberStyle.Duration },
            new TableColumn("sites") { Style = NumberStyle.Count },
            new TableColumn("converged", ColumnKind.Flag),
            new TableColumn("note", ColumnKind.Text))
        .AddRow(8, 0.929685511035582, 1.1e-5, -1.0634995105094756e-05, 0.0732, 1099511627776.0, true, "plain")
        .AddRow(16L, -1234.5678, 0.25, 3.3e-7, 185.0, 1024.0, false, "cut, \"inside\" a multiplet")
        .AddRow(24, 0.5, null, double.NaN, double.PositiveInfinity, 2.5, null, "")
        .AddRow(32, null, 0.0, 0.0, -1.5, double.NegativeInfinity, true, null);

    private static string Screen(DataTable table)
    {
        var rows = Enumerable.Range(0, table.RowCount).Select(r => string.Join(" | ", Enumerable.Range(0, table.Columns.Length).Select(c => table.ScreenText(r, c))));
        return string.Join(" | ", table.Columns.Select(c => c.Heading)) + "\n" + string.Join("\n", rows) + "\n";
    }
}
